/** The page's own text face as rules with the face in them, so that a drawing taken away keeps its letters. Empty where
 *  it cannot be had: the drawing then falls back on a usual face. */
export async function embeddedFontFaces(): Promise<string> {
  try {
    const rules = [...document.styleSheets].flatMap((sheet) => [...sheet.cssRules]).flatMap(faceOf);
    const faces = await Promise.all(rules.map(embedded));
    return faces.join('\n');
  } catch {
    return '';
  }
}

interface Face {
  family: string;
  weight: string;
  range: string;
  url: string;
}

/** The upright sans face for the scripts that names and numbers are written in. */
function faceOf(rule: CSSRule): Face[] {
  if (!(rule instanceof CSSFontFaceRule)) return [];
  const value = (name: string) => rule.style.getPropertyValue(name).trim();
  const family = value('font-family').replace(/^["']|["']$/g, '');
  const [, url] = /url\(["']?([^"')]+)["']?\)/.exec(value('src')) ?? [];
  const isOurs = family.includes('Hyperlegible Next') && value('font-style') !== 'italic';
  if (!url || !isOurs) return [];
  const base = rule.parentStyleSheet?.href ?? location.href;
  return [{ family, weight: value('font-weight'), range: value('unicode-range'), url: new URL(url, base).href }];
}

async function embedded({ family, weight, range, url }: Face): Promise<string> {
  const response = await fetch(url);
  if (!response.ok) return '';
  const bytes = new Uint8Array(await response.arrayBuffer());
  const text = Array.from(bytes, (byte) => String.fromCharCode(byte)).join('');
  const unicodeRange = range ? `unicode-range: ${range}; ` : '';
  const src = `url(data:font/woff2;base64,${btoa(text)}) format('woff2')`;
  return `@font-face { font-family: '${family}'; font-weight: ${weight || 'normal'}; ${unicodeRange}src: ${src}; }`;
}
