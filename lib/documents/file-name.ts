const MAX_CHARS = 60;

/** A name for a downloaded drawing that no header and no file system can trip over: "Q-2417 Headstock logo.pdf". */
export function pdfFileName(orderNumber: string, title: string): string {
  const safe = `${orderNumber} ${title}`
    .normalize('NFKD')
    .replace(/\s+/g, ' ')
    .replace(/[^A-Za-z0-9 -]/g, '')
    .replace(/ +/g, ' ')
    .trim()
    .slice(0, MAX_CHARS)
    .trim();
  return `${safe || 'drawing'}.pdf`;
}
