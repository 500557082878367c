/**
 * One element of a small XML text. Ranges are character positions, so that a part can be cut out
 * or replaced without writing the rest again.
 */
export type XmlElement = {
  /** Names from the root down, joined by `/`. */
  path: string;
  /** The whole element with its tags: [start, end). */
  start: number;
  end: number;
  /** What stands between the tags: [innerStart, innerEnd). */
  innerStart: number;
  innerEnd: number;
  hasChildren: boolean;
};

const maxElements = 5000;
const maxDepth = 32;

/** One piece of markup; text in between is whatever is not matched. */
const markup =
  /<!--[\s\S]*?-->|<\?[\s\S]*?\?>|<!\[CDATA\[[\s\S]*?\]\]>|<(\/?)([A-Za-z_][\w.:-]*)((?:\s+[\w.:-]+\s*=\s*(?:"[^"<]*"|'[^'<]*'))*)\s*(\/?)>/y;

/**
 * Lists the elements of an XML text in the order they begin. A deliberately small reader for
 * metadata chunks: no document type, no entities but the five that XML itself defines, bounded in
 * size and depth. null for everything that is not plainly well formed.
 */
export function scanXml(text: string): XmlElement[] | null {
  const elements: XmlElement[] = [];
  const open: XmlElement[] = [];
  let at = 0;
  for (;;) {
    const next = text.indexOf('<', at);
    if (next === -1) break;
    markup.lastIndex = next;
    const match = markup.exec(text);
    // A document type, a broken tag, an unfinished comment: not for us.
    if (!match) return null;
    at = markup.lastIndex;
    const [, closing, name, , selfClosing] = match;
    if (name === undefined) continue;
    if (closing) {
      const element = open.pop();
      if (!element || element.path.split('/').at(-1) !== name) return null;
      element.innerEnd = next;
      element.end = at;
      continue;
    }
    const parent = open.at(-1);
    if (parent) parent.hasChildren = true;
    else if (elements.length > 0) return null;
    const path = parent ? `${parent.path}/${name}` : name;
    const element = {
      path,
      start: next,
      end: at,
      innerStart: at,
      innerEnd: at,
      hasChildren: false,
    };
    elements.push(element);
    if (!selfClosing) open.push(element);
    if (elements.length > maxElements || open.length > maxDepth) return null;
  }
  return open.length === 0 && elements.length > 0 ? elements : null;
}

const predefined: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

/** The text of an element without children, with its character references resolved. */
export function xmlText(text: string, element: XmlElement): string {
  return text
    .slice(element.innerStart, element.innerEnd)
    .replace(/<!--[\s\S]*?-->/g, '')
    .replace(/<!\[CDATA\[([\s\S]*?)\]\]>|&(#x?)?(\w+);/g, (whole, cdata, numeric, name: string) => {
      if (typeof cdata === 'string') return cdata;
      if (numeric === undefined) return predefined[name] ?? whole;
      const code = Number.parseInt(name, numeric === '#x' ? 16 : 10);
      return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : '';
    })
    .trim();
}
