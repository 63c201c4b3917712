/** What an element's looks are made of; written out as attributes, they need neither our style sheet nor a browser. */
const PROPERTIES = [
  'fill',
  'fill-opacity',
  'stroke',
  'stroke-width',
  'stroke-dasharray',
  'stroke-linecap',
  'stroke-linejoin',
  'paint-order',
  'opacity',
  'font-size',
  'font-weight',
  'text-anchor',
] as const;
const COLOURS: ReadonlySet<string> = new Set(['fill', 'stroke']);

/** A copy of a drawing that looks the same anywhere: styles resolved, colours as plain sRGB, nothing but the drawing. */
export function styledCopy(drawing: SVGSVGElement): SVGSVGElement {
  const copy = drawing.cloneNode(true) as SVGSVGElement;
  const originals = [drawing, ...drawing.querySelectorAll<SVGElement>('*')];
  const copies = [copy, ...copy.querySelectorAll<SVGElement>('*')];
  originals.forEach((original, i) => {
    const target = copies[i]!;
    const style = getComputedStyle(original);
    for (const name of PROPERTIES) {
      const value = style.getPropertyValue(name);
      if (value !== '' && worthSaying(target, name, value)) target.setAttribute(name, plainValue(name, value));
    }
    for (const name of [...target.getAttributeNames()]) {
      // What still speaks of our style sheet stands on a group whose members say their own looks.
      const ofOurs = /var\(|light-dark\(|color-mix\(/.test(target.getAttribute(name)!);
      if (ofOurs || name === 'class' || name === 'style' || name.startsWith('data-') || name.startsWith('aria-'))
        target.removeAttribute(name);
    }
  });
  copy.removeAttribute('role');
  return copy;
}

/** Names and descriptions have no looks, groups pass on only what they themselves set. */
const worthSaying = (element: Element, name: string, value: string): boolean => {
  if (/^(title|desc|clipPath)$/i.test(element.tagName) || element.closest('clipPath')) return false;
  if (name === 'text-anchor' || name.startsWith('font-')) return /^(text|tspan)$/i.test(element.tagName);
  if (/^(g|svg)$/i.test(element.tagName)) return name === 'opacity' && value !== '1';
  return true;
};

const plainValue = (name: string, value: string): string => (COLOURS.has(name) ? plainColour(value) : value);

let brush: CanvasRenderingContext2D | null | undefined;
const known = new Map<string, string>();

/** A colour as #rrggbb, since few programs outside a browser know color-mix and light-dark. */
export function plainColour(value: string): string {
  if (value === 'none' || value.startsWith('url(') || /^#[0-9a-f]{6}$/i.test(value)) return value;
  const before = known.get(value);
  if (before) return before;
  brush ??= document.createElement('canvas').getContext('2d', { willReadFrequently: true });
  if (!brush) return value;
  brush.clearRect(0, 0, 1, 1);
  brush.fillStyle = value;
  brush.fillRect(0, 0, 1, 1);
  const [r, g, b, a] = brush.getImageData(0, 0, 1, 1).data;
  const hex = (x = 0) => x.toString(16).padStart(2, '0');
  const plain = a === 0 ? 'none' : `#${hex(r)}${hex(g)}${hex(b)}`;
  known.set(value, plain);
  return plain;
}
