const TAG = /<(\/?)([a-z0-9]+)((?: [a-z-]+="[^"<>]*")*)\s*\/?>/g;
const ATTRIBUTE = / ([a-z-]+)="([^"]*)"/g;
const ELEMENTS = new Set('p div h3 h4 ul ol li blockquote br a bdi strong em code'.split(' '));

export interface Markup {
  elements: { name: string; attributes: Record<string, string> }[];
  /** What a reader sees, entities resolved. */
  text: string;
}

/**
 * Reads markup written by our own renderers, strictly: anything that is not one of their well-formed tags, a `<` alone
 * included, is an error. So one escaped character too few fails the test that calls this.
 */
export function readMarkup(html: string): Markup {
  const elements: Markup['elements'] = [];
  const text = html.replace(TAG, (_all, closing: string, name: string, attributes: string) => {
    if (!ELEMENTS.has(name)) throw new Error(`element ${name} in ${html.slice(0, 200)}`);
    if (closing === '') elements.push({ name, attributes: readAttributes(attributes) });
    return name === 'br' ? '\n' : '';
  });
  if (/[<>]/.test(text)) throw new Error(`stray bracket in ${text.slice(0, 200)}`);
  return { elements, text: decode(text) };
}

function readAttributes(text: string): Record<string, string> {
  return Object.fromEntries([...text.matchAll(ATTRIBUTE)].map(([, name = '', value = '']) => [name, decode(value)]));
}

function decode(text: string): string {
  return text
    .replace(/&#(\d+);|&#x([0-9a-f]+);/gi, (_all, decimal?: string, hex?: string) =>
      String.fromCodePoint(decimal ? Number(decimal) : parseInt(hex ?? '', 16)),
    )
    .replace(/&lt;/g, '<')
    .replace(/&gt;/g, '>')
    .replace(/&quot;/g, '"')
    .replace(/&amp;/g, '&');
}

/** The ways in which markup could harm a reader; an empty list is what the tests ask for. */
export function harmsIn(markup: Markup): string[] {
  return markup.elements.flatMap(({ name, attributes }) =>
    Object.entries(attributes)
      .filter(([attribute, value]) => !isAllowed(name, attribute, value))
      .map(([attribute, value]) => `${name} ${attribute}="${value}"`),
  );
}

const FIXED: Record<string, string> = { target: '_blank', rel: 'noopener nofollow ugc', dir: 'auto' };

function isAllowed(element: string, attribute: string, value: string): boolean {
  if (attribute === 'href')
    return element === 'a' && /^(?:https?:\/\/[^@/]+\/|mailto:[^?%,\s]+@[^?%,@\s]+$)/.test(value);
  if (attribute === 'class') return !/fixed|inset|z-50|opacity/.test(value);
  if (attribute === 'style') return !/position|inset|display|url|@/.test(value);
  return FIXED[attribute] === value;
}
