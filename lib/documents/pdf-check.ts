import { promisify } from 'node:util';
import { inflate } from 'node:zlib';
import { MAX_PDF_BYTES, MAX_PDF_PAGES, MAX_PDF_UNPACKED_BYTES } from './limits';
import { decodeNames, PdfProblem, readFrame, type PackedObjects } from './pdf-frame';
import { requireIndex } from './pdf-index';
import { PDF_REFUSALS, type PdfRefusalCode } from './refusals';

export type PdfVerdict =
  | { ok: true; pages: number }
  /** `message` is for the person who chose the file. */
  | { ok: false; code: PdfRefusalCode; message: string };

const unpack = promisify(inflate);

const HEADER = /^%PDF-(?:1\.[0-7]|2\.0)[\r\n\t %]/;
const ACTIVE = /\/(?:JavaScript|Launch|EmbeddedFile|EmbeddedFiles|RichMedia|XFA|ImportData|SubmitForm)\b/;
const PAGE = /\/Type\s*\/Page\b/g;

/**
 * Whether these bytes are a PDF a person can be asked to sign: whole, open to read, with pages, and with nothing in it
 * that acts by itself. It reads the frame of the file only; nothing is drawn. Never throws for anything a file can hold.
 */
export async function checkPdf(pdf: Buffer): Promise<PdfVerdict> {
  try {
    return { ok: true, pages: await requirePdf(pdf) };
  } catch (error) {
    if (!(error instanceof PdfProblem)) throw error;
    return { ok: false, code: error.code, message: PDF_REFUSALS[error.code] };
  }
}

async function requirePdf(pdf: Buffer): Promise<number> {
  if (pdf.length === 0) throw new PdfProblem('empty');
  if (pdf.length > MAX_PDF_BYTES) throw new PdfProblem('too_large');
  if (!HEADER.test(pdf.subarray(0, 16).toString('latin1'))) throw new PdfProblem('not_a_pdf');
  const root = requireIndex(pdf);
  const { text, packed } = readFrame(pdf);
  const objects = [decodeNames(text), ...(await unpackAll(packed))];
  if (packed.length === 0 && !new RegExp(`(?:^|[^0-9])${root.replace(' ', '\\s+')}\\s+obj\\b`).test(text))
    throw new PdfProblem('broken');
  if (objects.some((object) => ACTIVE.test(object))) throw new PdfProblem('active');
  const pages = objects.reduce((sum, object) => sum + (object.match(PAGE)?.length ?? 0), 0);
  if (pages === 0) throw new PdfProblem('no_pages');
  if (pages > MAX_PDF_PAGES) throw new PdfProblem('too_many_pages');
  return pages;
}

async function unpackAll(packed: PackedObjects[]): Promise<string[]> {
  const texts: string[] = [];
  let leftBytes = MAX_PDF_UNPACKED_BYTES;
  for (const { dictionary, bytes } of packed) {
    const text = await unpackOne(dictionary, bytes, leftBytes);
    leftBytes -= text.length;
    texts.push(decodeNames(text));
  }
  return texts;
}

async function unpackOne(dictionary: string, bytes: Buffer, leftBytes: number): Promise<string> {
  const filter = /\/Filter\s*\[?\s*\/(\w+)/.exec(dictionary)?.[1];
  if (filter === undefined) return bytes.toString('latin1');
  if (filter !== 'FlateDecode') throw new PdfProblem('too_much_work');
  if (leftBytes <= 0) throw new PdfProblem('too_much_work');
  try {
    return (await unpack(bytes, { maxOutputLength: leftBytes })).toString('latin1');
  } catch (error) {
    const isTooLong = error instanceof Error && 'code' in error && error.code === 'ERR_BUFFER_TOO_LARGE';
    throw new PdfProblem(isTooLong ? 'too_much_work' : 'broken');
  }
}
