/** Texts that can be made again, kept while they are asked for: at most so many characters, the longest unasked go first. */
export class RecentTexts {
  readonly #texts = new Map<string, string>();
  readonly #limitChars: number;
  #heldChars = 0;

  constructor(limitChars: number) {
    this.#limitChars = limitChars;
  }

  get(key: string): string | undefined {
    const text = this.#texts.get(key);
    if (text === undefined) return undefined;
    this.#texts.delete(key);
    this.#texts.set(key, text);
    return text;
  }

  set(key: string, text: string): void {
    this.#drop(key);
    this.#texts.set(key, text);
    this.#heldChars += text.length;
    for (const [oldest] of this.#texts) {
      if (this.#heldChars <= this.#limitChars) return;
      this.#drop(oldest);
    }
  }

  #drop(key: string): void {
    this.#heldChars -= this.#texts.get(key)?.length ?? 0;
    this.#texts.delete(key);
  }
}
