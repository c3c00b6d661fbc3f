/** Builds dist/ before the tests that run the program, so that none of them can pass on yesterday's build. */
import { execFileSync } from 'node:child_process';

export function setup(): void {
  execFileSync(process.execPath, ['.tools/build.mjs'], { stdio: 'inherit' });
}
