import { deflateSync } from 'node:zlib';

/** A PDF put together by hand, so that a test can spoil any part of it. */
export type PdfParts = {
  /** Bodies of the objects 1, 2, 3 ...; object 1 is the root unless `trailer` says otherwise. */
  objects?: string[];
  header?: string;
  /** The trailer's dictionary between `<<` and `>>`. */
  trailer?: string;
  /** What stands after `startxref`; the true place when left out. */
  startsAt?: string;
  end?: string;
};

export const onePage = [
  '<< /Type /Catalog /Pages 2 0 R >>',
  '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
  '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 200 100] /Contents 4 0 R >>',
  streamOf('10 10 m 190 90 l S'),
];

/** A stream's object; `entries` go into its dictionary. */
export function streamOf(content: string | Buffer, entries = ''): string {
  const bytes = Buffer.from(content);
  return `<< /Length ${bytes.length} ${entries} >>\nstream\n${bytes.toString('latin1')}\nendstream`;
}

/** Objects packed into one stream (ISO 32000-1, 7.5.7), numbered from 1. */
export function packedObjects(objects: string[], spoil: (packed: Buffer) => Buffer = (packed) => packed): string {
  const places = objects.map((_, i) => objects.slice(0, i).join(' ').length + (i > 0 ? 1 : 0));
  const index = places.map((place, i) => `${i + 1} ${place}`).join(' ');
  const packed = spoil(deflateSync(`${index} ${objects.join(' ')}`));
  return streamOf(packed, `/Type /ObjStm /N ${objects.length} /First ${index.length + 1} /Filter /FlateDecode`);
}

export function pdfOf(parts: PdfParts = {}): Buffer {
  const objects = parts.objects ?? onePage;
  let body = parts.header ?? '%PDF-1.7\n%\xe2\xe3\xcf\xd3\n';
  const places = objects.map((object, i) => {
    const at = body.length;
    body += `${i + 1} 0 obj\n${object}\nendobj\n`;
    return at;
  });
  const table = places.map((at) => `${String(at).padStart(10, '0')} 00000 n \n`).join('');
  const start = body.length;
  body += `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${table}`;
  body += `trailer\n<< ${parts.trailer ?? `/Size ${objects.length + 1} /Root 1 0 R`} >>\n`;
  body += `startxref\n${parts.startsAt ?? start}\n${parts.end ?? '%%EOF\n'}`;
  return Buffer.from(body, 'latin1');
}

/** The place of a PDF's last index. */
export const indexPlace = (pdf: Buffer) => Number(/startxref\s+(\d+)\s+%%EOF\s*$/.exec(pdf.toString('latin1'))?.[1]);
