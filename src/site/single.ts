/**
 * The site as one file to mail. In: the pages of the site. Out: one page that needs nothing beside it: style, script, fonts and
 * pictures within, under a content policy that lets exactly these run. Never: a request to anywhere, a link to a file left behind.
 */
import { createHash } from 'node:crypto';
import { type OutputFile, UserError } from '../shell/types.ts';

const CONTENT = /<main id="content">([\s\S]*)<\/main>/;
/** The page whose ids the script asks for. */
const LISTED = 'machines.html';

/** `files` are those of the site, the first page first. Throws UserError where a template of the plant's own lost its frame. */
export function singleFile(files: Iterable<OutputFile>): OutputFile {
  const pages: { path: string; html: string }[] = [];
  const others = new Map<string, string | Uint8Array>();
  for (const { path, bytes } of files) {
    if (path.endsWith('.html') && typeof bytes === 'string') pages.push({ path, html: bytes });
    else others.set(path, bytes);
  }
  const first = pages[0];
  if (first === undefined) throw new Error('The site has no page.');
  const style = styleWithFonts(others);
  const script = textOf(others, 'script.js');
  const paths = new Set(pages.map((p) => p.path));
  const articles = pages
    .map((page) => `<article id="${idOf(page.path)}">${within(page.path, contentOf(page), paths, others)}</article>`)
    .join('\n');
  const policy = `default-src 'none'; img-src data:; font-src data:; style-src '${hashOf(style)}'; script-src '${hashOf(script)}'; base-uri 'none'; form-action 'none'`;
  const frame = within('', first.html.replace(CONTENT, '<main id="content">\u0000</main>'), paths, others)
    .replace(/<meta http-equiv="Content-Security-Policy"[^>]*>/, `<meta http-equiv="Content-Security-Policy" content="${policy}">`)
    .replace(/<link rel="stylesheet"[^>]*>/, () => `<style>${style}</style>`)
    .replace(/<script src="[^"]*"><\/script>/, () => `<script>${script}</script>`)
    .replaceAll(' aria-current="page"', '');
  if (!frame.includes(policy) || !frame.includes(style))
    throw new UserError(
      'The templates site/head and site/foot of this plant have lost the policy or the style sheet.',
      'Keep their <meta>, <link> and <script> lines as in the built-in ones.',
    );
  return { path: 'index.html', bytes: frame.replace('\u0000', () => articles) };
}

const idOf = (path: string): string => `page-${path.replace(/\.html$/, '').replaceAll('/', '-')}`;

/** Ids of a page within the one file: those of two pages may be the same. */
const idIn = (path: string, id: string): string => (path === '' || path === LISTED ? id : `${idOf(path)}-${id}`);

function contentOf(page: { readonly path: string; readonly html: string }): string {
  const found = CONTENT.exec(page.html)?.[1];
  if (found === undefined)
    throw new UserError(`The page ${page.path} has no <main id="content">.`, 'Keep {{> site/head}} and {{> site/foot}} in the template.');
  return found;
}

/** Ids, links and pictures of a page as they stand in the one file. Only tags are touched: text holds no `<`. */
function within(path: string, html: string, paths: ReadonlySet<string>, others: ReadonlyMap<string, string | Uint8Array>): string {
  return html
    .replace(/<a href="([^"]*)"([^>]*)>([\s\S]*?)<\/a>/g, (whole, href: string, rest: string, text: string) => {
      const to = target(path, href, paths);
      if (to === null) return /^https?:/.test(href) ? whole : text;
      return `<a href="#${to}"${rest}>${text}</a>`;
    })
    .replace(/(<[a-z][^>]*? id=")([^"]*)"/g, (_, head: string, id: string) => `${head}${idIn(path, id)}"`)
    .replace(/(<img[^>]*? src=")([^"]*)"/g, (_, head: string, src: string) => `${head}${pictureAt(others, resolved(path, src))}"`);
}

const resolved = (path: string, to: string): string =>
  path.includes('/') && to.startsWith('../') ? to.slice(3) : `${path.includes('/') ? path.slice(0, path.lastIndexOf('/') + 1) : ''}${to}`;

/** Where a link leads within the one file; null where it leads out of the site. */
function target(path: string, href: string, paths: ReadonlySet<string>): string | null {
  const [file = '', id] = href.split('#');
  if (file === '') return id === undefined ? null : idIn(path, id);
  const page = resolved(path, file);
  if (!paths.has(page)) return null;
  return id === undefined ? idOf(page) : idIn(page, id);
}

const base64 = (bytes: string | Uint8Array): string => Buffer.from(bytes).toString('base64');
const hashOf = (text: string): string => `sha256-${createHash('sha256').update(text).digest('base64')}`;

function textOf(files: ReadonlyMap<string, string | Uint8Array>, path: string): string {
  const bytes = files.get(path);
  if (typeof bytes !== 'string') throw new Error(`The site has no ${path}.`);
  return bytes;
}

function styleWithFonts(files: ReadonlyMap<string, string | Uint8Array>): string {
  return textOf(files, 'style.css').replace(
    /url\('(fonts\/[^']*)'\)/g,
    (_, path: string) => `url('data:font/woff2;base64,${base64(files.get(path) ?? '')}')`,
  );
}

function pictureAt(files: ReadonlyMap<string, string | Uint8Array>, path: string): string {
  return `data:image/${path.endsWith('.png') ? 'png' : 'jpeg'};base64,${base64(files.get(path) ?? '')}`;
}
