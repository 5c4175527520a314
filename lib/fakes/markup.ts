const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

/** Text as HTML or XML shows it, in element content and in quoted attributes alike. Controls that XML forbids become U+FFFD. */
export function escapeMarkup(text: string): string {
  return text
    .replace(/[&<>"']/g, (char) => ENTITIES[char] ?? char)
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '\ufffd');
}
