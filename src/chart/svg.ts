/**
 * A drawing as SVG for the site. Colours are classes (`f-…` for fill, `s-…` for stroke), so that light and dark follow the
 * style sheet and no inline style is needed under the content security policy.
 */
import type { Drawing, Shape } from './drawing.ts';

const ESCAPES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escaped = (text: string): string => text.replace(/[&<>"]/g, (c) => ESCAPES[c] as string);

function shapeText(shape: Shape): string {
  if (shape.kind === 'text') {
    const anchor = shape.anchor === 'start' ? '' : ` text-anchor="${shape.anchor}"`;
    return `<text x="${shape.x}" y="${shape.y}" font-size="${shape.size}"${anchor} class="f-${shape.fill}"${shape.bold ? ' font-weight="600"' : ''}>${escaped(shape.text)}</text>`;
  }
  const fillClass = shape.fill === null ? 'f-none' : `f-${shape.fill}`;
  const strokeClass = shape.stroke === null ? '' : ` s-${shape.stroke}`;
  const width = shape.stroke === null ? '' : ` stroke-width="${Math.round(shape.strokeWidth * 100) / 100}"`;
  const dash = shape.dash.length === 0 ? '' : ` stroke-dasharray="${shape.dash.join(' ')}"`;
  const { circle } = shape;
  if (circle !== undefined)
    return `<circle class="${fillClass}${strokeClass}"${width} cx="${circle[0]}" cy="${circle[1]}" r="${circle[2]}"/>`;
  return `<path class="${fillClass}${strokeClass}"${width}${dash} d="${shape.d}"/>`;
}

/** `decorative`: the words stand beside it already, so it is hidden from readers. */
export function toSvg(drawing: Drawing, options: { readonly decorative?: boolean; readonly className?: string } = {}): string {
  const name = options.decorative === true ? 'aria-hidden="true"' : `role="img" aria-label="${escaped(drawing.alt)}"`;
  const className = options.className === undefined ? '' : ` class="${options.className}"`;
  // A class of its own sizes it by the style sheet.
  const size = options.className === undefined ? ` width="${drawing.width}" height="${drawing.height}"` : '';
  return `<svg${className} viewBox="0 0 ${drawing.width} ${drawing.height}"${size} ${name}>${drawing.shapes.map(shapeText).join('')}</svg>`;
}
