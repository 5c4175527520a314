import { MAX_PDF_FRAME_BYTES, MAX_PDF_STREAMS } from './limits';
import type { PdfRefusalCode } from './refusals';

/** A PDF that is not taken. */
export class PdfProblem extends Error {
  constructor(readonly code: PdfRefusalCode) {
    super(code);
  }
}

export type PackedObjects = { dictionary: string; bytes: Buffer };

/** What frames the streams of a PDF, as Latin-1 text, and the streams that hold further objects. */
export type PdfFrame = { text: string; packed: PackedObjects[] };

const STREAM = Buffer.from('stream');
const END = Buffer.from('endstream');
const LF = 10;
const CR = 13;
/** A dictionary longer than this does not belong to an object stream. */
const DICTIONARY_CHARS = 4_096;

/** Right after the line break that ends the keyword (ISO 32000-1, 7.3.8.1), or null where the word means something else. */
function dataStart(pdf: Buffer, keywordAt: number): number | null {
  const after = keywordAt + STREAM.length;
  if (pdf[after] === LF) return after + 1;
  if (pdf[after] === CR) return pdf[after + 1] === LF ? after + 2 : after + 1;
  return null;
}

/**
 * Separates what a PDF says of itself from the contents of its streams, where any bytes may stand.
 * @throws PdfProblem 'truncated' for a stream without an end, 'too_much_work' beyond the limits
 */
export function readFrame(pdf: Buffer): PdfFrame {
  const parts: string[] = [];
  const packed: PackedObjects[] = [];
  let frameBytes = 0;
  let from = 0;
  for (let streams = 0; ; streams += 1) {
    if (streams > MAX_PDF_STREAMS) throw new PdfProblem('too_much_work');
    const start = nextStream(pdf, from);
    const part = pdf.subarray(from, start?.keywordAt ?? pdf.length);
    frameBytes += part.length;
    if (frameBytes > MAX_PDF_FRAME_BYTES) throw new PdfProblem('too_much_work');
    const text = part.toString('latin1');
    parts.push(text);
    if (!start) return { text: parts.join('\n'), packed };
    const end = pdf.indexOf(END, start.dataAt);
    if (end < 0) throw new PdfProblem('truncated');
    const dictionary = text.slice(Math.max(text.lastIndexOf('obj'), text.length - DICTIONARY_CHARS));
    if (/\/Type\s*\/ObjStm\b/.test(decodeNames(dictionary)))
      packed.push({ dictionary: decodeNames(dictionary), bytes: pdf.subarray(start.dataAt, end) });
    from = end + END.length;
  }
}

function nextStream(pdf: Buffer, from: number): { keywordAt: number; dataAt: number } | null {
  for (let at = pdf.indexOf(STREAM, from), tries = 0; at >= 0; at = pdf.indexOf(STREAM, at + 1), tries += 1) {
    if (tries > MAX_PDF_STREAMS) throw new PdfProblem('too_much_work');
    const dataAt = dataStart(pdf, at);
    if (dataAt !== null) return { keywordAt: at, dataAt };
  }
  return null;
}

/** Names may hide letters behind `#` and two hex digits (ISO 32000-1, 7.3.5). */
export const decodeNames = (text: string) =>
  text.replace(/#([0-9A-Fa-f]{2})/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)));
