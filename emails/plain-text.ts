const ENTITIES: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', '#x27': "'" };
const TOKEN = /<(\/?)([a-z][a-z0-9]*)((?:[\s/][^<>]*)?)>|<!--[^]*?-->|<![^<>]*>|[^<]+/gi;
const UNREAD = new Set(['head', 'style', 'script', 'title']);
const EMPTY = new Set(['br', 'img', 'meta', 'link', 'hr']);
/** Line ends around an element. */
const BREAKS: Record<string, number> = { p: 2, h1: 2, h2: 2, table: 1, tr: 1, td: 1, div: 1, li: 1 };

const decoded = (text: string) =>
  text.replace(/&(amp|lt|gt|quot|#x27);/g, (whole, name: string) => ENTITIES[name] ?? whole);
const attribute = (attributes: string, name: string) =>
  decoded(new RegExp(`\\s${name}="([^"]*)"`).exec(attributes)?.[1] ?? '');

/** Gathers text with the line ends that belong between its parts. */
class Page {
  text = '';
  private breaks = 0;

  break(lines: number): void {
    this.breaks = Math.max(this.breaks, lines);
  }

  write(words: string): void {
    if (words === '') return;
    if (this.text !== '') this.text += '\n'.repeat(this.breaks);
    const atStart = this.text === '' || this.text.endsWith('\n');
    this.breaks = 0;
    this.text += atStart ? words.trimStart() : words;
  }
}

type Link = { href: string; from: number };

/** The parts of a mail that are being read, by what they are. */
class Reader {
  readonly page = new Page();
  private readonly links: Link[] = [];
  private readonly isolates: boolean[] = [];
  private skipped: string | undefined;
  private depth = 0;

  words(text: string): void {
    if (this.skipped === undefined) this.page.write(decoded(text).replace(/\s+/g, ' '));
  }

  tag(name: string, isClosing: boolean, attributes: string): void {
    if (this.skipped !== undefined) return this.skip(name, isClosing);
    const isUnread = UNREAD.has(name) || attributes.includes('data-skip-in-text="true"');
    if (isUnread && !isClosing && !EMPTY.has(name)) {
      this.skipped = name;
      this.depth = 1;
      return;
    }
    if (name === 'br') this.page.break(1);
    if (name === 'img') this.page.write(attribute(attributes, 'alt'));
    if (name === 'a') this.link(isClosing, attributes);
    if (name === 'bdi') this.isolate(isClosing, attributes);
    this.page.break(BREAKS[name] ?? 0);
  }

  private skip(name: string, isClosing: boolean): void {
    if (name === this.skipped) this.depth += isClosing ? -1 : 1;
    if (this.depth === 0) this.skipped = undefined;
  }

  private link(isClosing: boolean, attributes: string): void {
    if (!isClosing) return void this.links.push({ href: attribute(attributes, 'href'), from: this.page.text.length });
    const link = this.links.pop();
    if (link && this.page.text.slice(link.from).trim() !== link.href) this.page.write(` ${link.href}`);
  }

  private isolate(isClosing: boolean, attributes: string): void {
    if (isClosing) return this.isolates.pop() ? this.page.write('\u2069') : undefined;
    const isIsolated = attributes.includes('data-isolate="true"');
    this.isolates.push(isIsolated);
    if (isIsolated) this.page.write('\u2068');
  }
}

/**
 * The text part of a mail from its HTML, as React wrote it: every `<` and `>` of the words is an entity there. Links stand
 * with their address, pictures as their alternative text, isolated names between isolates; the preview line is left out.
 */
export function plainText(html: string): string {
  const reader = new Reader();
  for (const [token, closing, name, attributes = ''] of html.matchAll(TOKEN)) {
    if (name !== undefined) reader.tag(name.toLowerCase(), closing === '/', attributes);
    else if (!token.startsWith('<')) reader.words(token);
  }
  return reader.page.text.trim();
}
