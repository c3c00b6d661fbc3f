/** `npm run simulate`: makes the table of figures again. */
import { writeFileSync } from 'node:fs';
import { figures, tableText } from './figures.ts';

const text = tableText(figures());
writeFileSync(new URL('table.txt', import.meta.url), text);
process.stdout.write(text);
