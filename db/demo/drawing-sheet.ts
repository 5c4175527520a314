/** Writes a one-page PDF by hand: lines, curves and words on an A4 sheet across, in points from its lower left corner. */

const WIDTH_PT = 842;
const HEIGHT_PT = 595;

export type SheetNotes = { orderNumber: string; title: string; instrument: string; scale: string };

/** Words stand in a string of PDF: brackets and back slashes would end it. */
const quoted = (words: string) => words.replace(/[^\x20-\x7e]/g, '').replace(/[\\()]/g, (sign) => `\\${sign}`);

const text = (x: number, y: number, sizePt: number, words: string) =>
  `BT /F1 ${sizePt} Tf ${x} ${y} Td (${quoted(words)}) Tj ET`;

const MM_PER_PT = 25.4 / 72;

/** A length with its end strokes and its figure above the middle; `smaller` is how many times smaller it is drawn. */
export function dimension(x1: number, x2: number, y: number, smaller = 1): string {
  const words = `${((x2 - x1) * MM_PER_PT * smaller).toFixed(1)} mm`;
  const middle = (x1 + x2) / 2 - words.length * 2.4;
  const ends = [x1, x2].map((x) => `${x} ${y - 5} m ${x} ${y + 5} l S`).join(' ');
  return `0.5 w ${x1} ${y} m ${x2} ${y} l S ${ends} ${text(middle, y + 5, 9, words)}`;
}

export const circle = (x: number, y: number, r: number) => {
  const k = r * 0.5523;
  return [
    `${x + r} ${y} m`,
    `${x + r} ${y + k} ${x + k} ${y + r} ${x} ${y + r} c`,
    `${x - k} ${y + r} ${x - r} ${y + k} ${x - r} ${y} c`,
    `${x - r} ${y - k} ${x - k} ${y - r} ${x} ${y - r} c`,
    `${x + k} ${y - r} ${x + r} ${y - k} ${x + r} ${y} c S`,
  ].join(' ');
};

function frame({ orderNumber, title, instrument, scale }: SheetNotes): string {
  const box = '1.2 w 24 24 794 547 re S 0.6 w 554 24 264 74 re S 554 61 m 818 61 l S 700 24 m 700 61 l S';
  const words = [
    text(562, 76, 13, title),
    text(562, 44, 9, instrument),
    text(562, 31, 9, 'Quillhaven Guitar Works'),
    text(708, 44, 9, orderNumber),
    text(708, 31, 9, scale),
  ];
  return [box, ...words].join('\n');
}

/** A sheet with its frame and its drawing, as the bytes of a PDF. */
export function drawSheet(notes: SheetNotes, drawing: string): Buffer {
  const content = `${frame(notes)}\n${drawing}`;
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    `<< /Type /Page /Parent 2 0 R /MediaBox [0 0 ${WIDTH_PT} ${HEIGHT_PT}] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>`,
    `<< /Length ${content.length} >>\nstream\n${content}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica /Encoding /WinAnsiEncoding >>',
  ];
  let body = '%PDF-1.4\n';
  const places = objects.map((object, index) => {
    const at = body.length;
    body += `${index + 1} 0 obj\n${object}\nendobj\n`;
    return `${String(at).padStart(10, '0')} 00000 n \n`;
  });
  const index = `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${places.join('')}`;
  const trailer = `trailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\nstartxref\n${body.length}\n%%EOF\n`;
  return Buffer.from(`${body}${index}${trailer}`, 'latin1');
}
