/** The beginning of a text, cut between words, with an ellipsis when something was left out. */
export function excerpt(text: string, maxChars: number): string {
  const line = text.replace(/\s+/g, ' ').trim();
  if (line.length <= maxChars) return line;
  const cut = line.slice(0, maxChars);
  const lastSpace = cut.lastIndexOf(' ');
  return `${lastSpace > maxChars / 2 ? cut.slice(0, lastSpace) : cut}…`;
}
