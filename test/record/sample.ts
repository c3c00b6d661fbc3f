import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** Text of the kept sample of a released format: seven machines of the demo plant. A sample is never renewed, only added. */
export const sampleText = (format: number): string => readFileSync(fileURLToPath(new URL(`../records/format-${format}.json`, import.meta.url)), 'utf8');
