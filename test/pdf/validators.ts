/** Validators from outside, where this machine has them: qpdf, and the PDF/A-1b validator of Debian's libpdfbox2-java. */
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

const JARS = '/usr/share/java';
const jars = existsSync(`${JARS}/preflight.jar`)
  ? readdirSync(JARS)
      .filter((f) => /^(preflight|pdfbox2|fontbox2|xmpbox|commons-logging|javax\.activation|jaxb-api|commons-io)\.jar$/.test(f))
      .map((f) => `${JARS}/${f}`)
  : [];

export const hasQpdf = spawnSync('qpdf', ['--version']).status === 0;
export const hasA1bValidator = jars.length > 0 && spawnSync('java', ['-version']).status === 0;
if (!hasQpdf) console.warn('qpdf is not on this machine: its check is skipped.');
if (!hasA1bValidator) console.warn('libpdfbox2-java is not on this machine: the PDF/A-1b validator is skipped.');

function kept(bytes: Uint8Array): string {
  const path = join(mkdtempSync(join(tmpdir(), 'swayfolio-pdf-')), 'file.pdf');
  writeFileSync(path, bytes);
  return path;
}

/** What `qpdf --check` prints; throws where it finds a fault. */
export const qpdfCheck = (bytes: Uint8Array): string => execFileSync('qpdf', ['--check', kept(bytes)]).toString();

/** What the PDF/A-1b validator prints. */
export function a1bCheck(bytes: Uint8Array): string {
  const run = spawnSync('java', ['-cp', jars.join(':'), 'org.apache.pdfbox.preflight.Validator_A1b', kept(bytes)], {
    encoding: 'utf8',
    maxBuffer: 1 << 26,
  });
  return `${run.stdout}${run.stderr}`;
}
