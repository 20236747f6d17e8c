/**
 * Saving a plot as a picture that stands on its own: an SVG whose colours are written out as for paper, or a PNG of it.
 * Holds: the file names no font of the page's and no style sheet, and holds nothing that only serves the page.
 */
import { downloadBlob, downloadText } from '../../app/files';

/** A plot's own class while it is written out: its colours are those of the theme, also where the page's are forced. */
const FOR_PAPER = 'for-paper';
/** Marks what only serves the page: hit areas, focus. */
const PAGE_ONLY = '[data-page-only]';
/** Attributes that mean something in the page alone. */
const OF_THE_PAGE = /^(class|style|id|role|tabindex|data-.*|aria-.*)$/;
/** Pixels of a PNG for each of the plot's. */
const SCALE = 2;

/** Properties that make the picture, all of them inherited, by their names as attributes. */
const PAINT = [
  ...['fill', 'fill-opacity', 'stroke', 'stroke-width', 'stroke-dasharray', 'stroke-linecap', 'stroke-linejoin'],
  ...['stroke-opacity', 'paint-order', 'font-size', 'font-style', 'font-weight', 'text-anchor'],
] as const;

/** The plot as the text of an SVG file. */
export function svgText(svg: SVGSVGElement, title: string): string {
  const place = svg.parentElement;
  if (place === null) throw new Error('A plot is saved from where it stands.');
  const copy = svg.cloneNode(true) as SVGSVGElement;
  copy.classList.add(FOR_PAPER);
  copy.setAttribute('aria-hidden', 'true');
  for (const part of copy.querySelectorAll(PAGE_ONLY)) part.remove();
  // Places that the page's framework has marked.
  const comments = document.createTreeWalker(copy, NodeFilter.SHOW_COMMENT);
  const marked: Node[] = [];
  while (comments.nextNode() !== null) marked.push(comments.currentNode);
  for (const comment of marked) comment.parentNode?.removeChild(comment);
  // Styles are worked out where the plot stands; all is as it was before anything is painted.
  place.append(copy);
  const { styles, ground } = inLightTheme(() => {
    return {
      styles: [
        [copy, paintOf(copy, null)] as const,
        ...[...copy.querySelectorAll('*')].map((part) => [part, paintOf(part, part.parentElement)] as const),
      ],
      ground: getComputedStyle(copy).getPropertyValue('background-color'),
    };
  });
  copy.remove();
  for (const [part, paint] of styles) {
    for (const name of part.getAttributeNames()) if (OF_THE_PAGE.test(name)) part.removeAttribute(name);
    for (const [name, value] of paint) part.setAttribute(name, value);
  }
  const [, , width = '0', height = '0'] = (svg.getAttribute('viewBox') ?? '').split(' ');
  copy.setAttribute('width', width);
  copy.setAttribute('height', height);
  copy.prepend(titleOf(title), paper(width, height, ground));
  return new XMLSerializer().serializeToString(copy);
}

/** What `read` gives while the page is in its light theme. */
function inLightTheme<T>(read: () => T): T {
  const root = document.documentElement;
  const theme = root.getAttribute('data-theme');
  root.setAttribute('data-theme', 'light');
  try {
    return read();
  } finally {
    if (theme === null) root.removeAttribute('data-theme');
    else root.setAttribute('data-theme', theme);
  }
}

/** What of the paint an element does not inherit from the one that it stands in. */
function paintOf(part: Element, within: Element | null): readonly (readonly [name: string, value: string])[] {
  const own = getComputedStyle(part);
  const inherited = within === null ? undefined : getComputedStyle(within);
  const paint = PAINT.map((name): [string, string, string | undefined] => [
    name,
    own.getPropertyValue(name),
    inherited?.getPropertyValue(name),
  ]);
  paint.push([
    'font-family',
    facesOf(own.fontFamily),
    inherited === undefined ? undefined : facesOf(inherited.fontFamily),
  ]);
  return paint.flatMap(([name, value, before]) => (value === '' || value === before ? [] : [[name, value] as const]));
}

/** The faces without the page's own, which no other program has; a generic family ends the list. */
export function facesOf(family: string): string {
  const faces = family
    .split(',')
    .map((face) => face.trim())
    .filter((face) => face !== '' && !/levelwright/i.test(face));
  const last = faces.at(-1) ?? '';
  return (/^(sans-serif|serif|monospace)$/.test(last) ? faces : [...faces, 'sans-serif']).join(', ');
}

function titleOf(title: string): SVGElement {
  const element = document.createElementNS('http://www.w3.org/2000/svg', 'title');
  element.textContent = title;
  return element;
}

function paper(width: string, height: string, ground: string): SVGElement {
  const element = document.createElementNS('http://www.w3.org/2000/svg', 'rect');
  element.setAttribute('width', width);
  element.setAttribute('height', height);
  // A transparent ground would be black in some viewers.
  element.setAttribute('fill', ground === '' || /^(transparent|rgba\(.*, 0\))$/.test(ground) ? '#ffffff' : ground);
  return element;
}

/** The picture as a PNG. */
export async function pngOf(text: string): Promise<Blob> {
  const address = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml' }));
  try {
    const image = new Image();
    image.src = address;
    await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = Math.ceil(image.naturalWidth * SCALE);
    canvas.height = Math.ceil(image.naturalHeight * SCALE);
    const drawing = canvas.getContext('2d');
    if (drawing === null) throw new Error('This browser gives no canvas to draw on.');
    drawing.drawImage(image, 0, 0, canvas.width, canvas.height);
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
    if (blob === null) throw new Error('This browser could not make a PNG of the plot.');
    return blob;
  } finally {
    URL.revokeObjectURL(address);
  }
}

/** A name for the file, of what every file system takes. */
export function plotFileName(title: string, ending: 'svg' | 'png'): string {
  const name = title
    .trim()
    .toLocaleLowerCase('en')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  return `${name === '' ? 'plot' : name}.${ending}`;
}

export function savePlotAsSvg(svg: SVGSVGElement, title: string): void {
  downloadText(plotFileName(title, 'svg'), svgText(svg, title), 'image/svg+xml');
}

export async function savePlotAsPng(svg: SVGSVGElement, title: string): Promise<void> {
  downloadBlob(plotFileName(title, 'png'), await pngOf(svgText(svg, title)));
}
