/** First paint of the list of many machines, from file://, in the npm browser. Never a test: times depend on the machine. */
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { launch } from '../browser/launch.ts';
import { plantOf, recordOfFiles, siteOf } from '../site/plants.ts';

export interface FirstPaint {
  /** From the request of the page to the first paint and to the end of loading. */
  readonly paintMs: number;
  readonly loadedMs: number;
  readonly kilobytes: number;
}

export async function firstPaint(machines: number, folder: string): Promise<FirstPaint> {
  const { record, text } = recordOfFiles(plantOf({ machines, exceptionEvery: 20, points: 1 }));
  const files = siteOf(record, text);
  for (const [path, bytes] of files) {
    mkdirSync(dirname(join(folder, path)), { recursive: true });
    writeFileSync(join(folder, path), bytes);
  }
  const browser = await launch();
  try {
    const page = await browser.newPage();
    await page.goto(pathToFileURL(join(folder, 'machines.html')).href);
    // As text: it runs in the page, whose globals are not this program's.
    const paintMs = await page.evaluate<number>("performance.getEntriesByName('first-contentful-paint')[0].startTime");
    const loadedMs = await page.evaluate<number>("performance.getEntriesByType('navigation')[0].loadEventEnd");
    return { paintMs, loadedMs, kilobytes: Buffer.byteLength(files.get('machines.html') ?? '') / 1000 };
  } finally {
    await browser.close();
  }
}
