const RIGHT_TO_LEFT = /[\u0590-\u08ff\ufb1d-\ufdff\ufe70-\ufefc\u{10800}-\u{10fff}\u{1e800}-\u{1efff}]/u;

/** A name for a line of plain text: one written right to left is isolated, so that it does not turn the words around it. */
export function nameInLine(name: string): string {
  return RIGHT_TO_LEFT.test(name) ? `\u2068${name}\u2069` : name;
}

/** A person's, shop's or instrument's name inside a sentence of HTML. */
export function Name({ children }: { children: string }) {
  return <bdi data-isolate={RIGHT_TO_LEFT.test(children) ? 'true' : undefined}>{children}</bdi>;
}
