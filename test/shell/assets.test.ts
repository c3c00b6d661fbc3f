import { existsSync, mkdirSync, mkdtempSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeEach, expect, test } from 'vitest';
import { loadAssets } from '../../src/shell/assets.ts';
import { packageRoot, packageVersion } from '../../src/shell/package.ts';

let plant = '';
beforeEach(() => {
  plant = mkdtempSync(join(tmpdir(), 'swayfolio-plant-'));
});

const magic = (bytes: Uint8Array | undefined): string => Buffer.from(bytes?.subarray(0, 4) ?? []).toString('latin1');

test('fonts: TrueType for the PDF, WOFF2 for the site (magic numbers: OpenType 1.9 "sfnt version", W3C WOFF2 4.1)', () => {
  const { pdfFonts, siteFonts } = loadAssets(null);
  for (const face of Object.values(pdfFonts)) expect(magic(face)).toBe('\u0000\u0001\u0000\u0000');
  expect(siteFonts.size).toBe(4);
  for (const face of siteFonts.values()) expect(magic(face)).toBe('wOF2');
});

test('a picture is read from the plant folder and never from outside', () => {
  writeFileSync(join(plant, 'logo.png'), 'png');
  writeFileSync(join(plant, '..', 'swayfolio-secret'), 's');
  symlinkSync('/etc/hostname', join(plant, 'link.png'));
  const { picture } = loadAssets(plant);
  expect(Buffer.from(picture('logo.png') ?? []).toString()).toBe('png');
  for (const path of ['gone.png', '../swayfolio-secret', '/etc/hostname', 'link.png']) expect(picture(path)).toBeNull();
  expect(loadAssets(null).picture('logo.png')).toBeNull();
});

test("a plant's own template of the same name wins; one that overrides nothing is an error", () => {
  const name = [...loadAssets(null).templates.keys()].find((path) => path.endsWith('.hbs')) ?? '';
  expect(existsSync(join(packageRoot, 'templates', name))).toBe(true);
  mkdirSync(join(plant, 'templates', name, '..'), { recursive: true });
  writeFileSync(join(plant, 'templates', name), 'ours');
  expect(loadAssets(plant).templates.get(name)).toBe('ours');
  writeFileSync(join(plant, 'templates', 'no-such.hbs'), 'x');
  expect(() => loadAssets(plant)).toThrow('overrides nothing');
});

test('the version is the package’s', () => {
  expect(packageVersion()).toMatch(/^\d+\.\d+\.\d+/);
});
