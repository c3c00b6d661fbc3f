/** The browser of the npm package, with the libraries it brings along. */
export async function launch() {
  // Read when the package is imported: it then unpacks its own libraries where the machine has none.
  process.env['AWS_EXECUTION_ENV'] = 'AWS_Lambda_nodejs20.x';
  const { default: chromium } = await import('@sparticuz/chromium');
  const { chromium: playwright } = await import('playwright-core');
  return playwright.launch({ executablePath: await chromium.executablePath(), args: ['--no-sandbox'], headless: true });
}
