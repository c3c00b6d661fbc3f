import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** Text of the kept sample of a format: seven machines of the demo plant. Once its format is released it is kept as it is (renew-sample.ts). */
export const sampleText = (format: number): string =>
  readFileSync(fileURLToPath(new URL(`../records/format-${format}.json`, import.meta.url)), 'utf8');
