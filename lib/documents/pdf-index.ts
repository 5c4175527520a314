import { MAX_PDF_REVISIONS } from './limits';
import { decodeNames, PdfProblem } from './pdf-frame';

const TAIL_BYTES = 2_048;
/** A trailer or the dictionary of an index stream; longer ones are not written by any program that draws. */
const SECTION_BYTES = 16 * 1024;
const TABLE_BYTES = 8 * 1024 * 1024;

const latin = (pdf: Buffer, from: number, to: number) => pdf.subarray(from, to).toString('latin1');

/**
 * Walks a PDF's index from its end back through its earlier versions (ISO 32000-1, 7.5.4 to 7.5.8).
 * @returns which object is its root, as "12 0"
 * @throws PdfProblem 'truncated', 'more_behind', 'broken', 'locked' or 'too_much_work'
 */
export function requireIndex(pdf: Buffer): string {
  const seen = new Set<number>();
  let root: string | undefined;
  for (let at: number | null = lastIndexAt(pdf); at !== null;) {
    if (seen.has(at)) throw new PdfProblem('broken');
    if (seen.size >= MAX_PDF_REVISIONS) throw new PdfProblem('too_much_work');
    seen.add(at);
    const section: string = sectionAt(pdf, at);
    if (/\/Encrypt\b/.test(section)) throw new PdfProblem('locked');
    root ??= /\/Root\s+(\d{1,10}\s+\d{1,5})\s+R\b/.exec(section)?.[1];
    const earlier = /\/Prev\s+(\d{1,10})\b/.exec(section)?.[1];
    at = earlier === undefined ? null : Number(earlier);
  }
  if (!root) throw new PdfProblem('broken');
  return root.replace(/\s+/, ' ');
}

function lastIndexAt(pdf: Buffer): number {
  const tail = latin(pdf, Math.max(0, pdf.length - TAIL_BYTES), pdf.length);
  const end = tail.lastIndexOf('%%EOF');
  if (end < 0) throw new PdfProblem(pdf.lastIndexOf('%%EOF') < 0 ? 'truncated' : 'more_behind');
  if (/[^\s\0]/.test(tail.slice(end + '%%EOF'.length))) throw new PdfProblem('more_behind');
  const at = /startxref\s+(\d{1,10})\s*$/.exec(tail.slice(0, end))?.[1];
  if (at === undefined) throw new PdfProblem('truncated');
  return Number(at);
}

/** The dictionary that an index section carries, its names decoded. */
function sectionAt(pdf: Buffer, at: number): string {
  if (at >= pdf.length) throw new PdfProblem('broken');
  const start = latin(pdf, at, at + 64).trimStart();
  if (/^\d{1,10}\s+\d{1,5}\s+obj\b/.test(start)) return indexStream(pdf, at);
  if (!/^xref\s/.test(start)) throw new PdfProblem('broken');
  const trailer = pdf.subarray(at, at + TABLE_BYTES).indexOf('trailer');
  if (trailer < 0) throw new PdfProblem('broken');
  return dictionary(pdf, at + trailer + 'trailer'.length);
}

function indexStream(pdf: Buffer, at: number): string {
  const section = dictionary(pdf, at);
  if (!/\/Type\s*\/XRef\b/.test(section)) throw new PdfProblem('broken');
  return section;
}

function dictionary(pdf: Buffer, at: number): string {
  const text = latin(pdf, at, at + SECTION_BYTES);
  const end = text.search(/startxref|stream[\r\n]|endobj/);
  if (end < 0 || !text.slice(0, end).includes('<<')) throw new PdfProblem('broken');
  return decodeNames(text.slice(0, end));
}
