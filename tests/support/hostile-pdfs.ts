import { deflateSync } from 'node:zlib';
import { indexPlace, onePage, packedObjects, pdfOf, streamOf } from './pdf-bytes';
import type { PdfRefusalCode } from '@/lib/documents/refusals';

export type HostilePdf = { name: string; bytes: Buffer; outcome: PdfRefusalCode };

const good = pdfOf();
const text = good.toString('latin1');
const latin = (value: string) => Buffer.from(value, 'latin1');
const withCatalog = (entries: string) =>
  pdfOf({ objects: [`<< /Type /Catalog /Pages 2 0 R ${entries} >>`, ...onePage.slice(1)] });
const withObject = (object: string) => pdfOf({ objects: [...onePage, object] });
const manyPages = (count: number) => [
  ...onePage.slice(0, 2),
  ...Array.from({ length: count }, () => '<< /Type /Page /Parent 2 0 R >>'),
];

/** A later version that names an earlier one at `previous`. */
function revised(pdf: Buffer, previous: string): Buffer {
  const at = pdf.length;
  const index = `xref\n0 0\ntrailer\n<< /Size 5 /Root 1 0 R /Prev ${previous} >>\nstartxref\n${at}\n%%EOF\n`;
  return Buffer.concat([pdf, latin(index)]);
}

function manyRevisions(count: number): Buffer {
  let pdf = good;
  for (let i = 0; i < count; i += 1) pdf = revised(pdf, String(indexPlace(pdf)));
  return pdf;
}

const bomb = streamOf(
  deflateSync(Buffer.alloc(48 * 1024 * 1024, 32)),
  '/Type /ObjStm /N 1 /First 4 /Filter /FlateDecode',
);

const rows: [name: string, bytes: Buffer, outcome: PdfRefusalCode][] = [
  ['nothing', Buffer.alloc(0), 'empty'],
  ['a page of the web', latin('<!doctype html><script>alert(1)</script>'), 'not_a_pdf'],
  ['a picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13]), 'not_a_pdf'],
  ['an archive', latin('PK\x03\x04 drawing.pdf'), 'not_a_pdf'],
  ['noughts', Buffer.alloc(4096), 'not_a_pdf'],
  ['a web page before it', Buffer.concat([latin('<script>alert(1)</script>\n'), good]), 'not_a_pdf'],
  ['a version that never was', pdfOf({ header: '%PDF-9.9\n' }), 'not_a_pdf'],
  ['a header that goes on as something else', pdfOf({ header: '%PDF-1.7<script>\n' }), 'not_a_pdf'],
  ['only its first line', latin('%PDF-1.7\n'), 'truncated'],
  ['cut in half', good.subarray(0, good.length / 2), 'truncated'],
  ['without its last line', latin(text.replace('%%EOF\n', '')), 'truncated'],
  ['without the place of its index', latin(text.replace(/startxref\n\d+\n/, '')), 'truncated'],
  ['a place of its index that is no number', pdfOf({ startsAt: '-12' }), 'truncated'],
  ['an index behind its end', pdfOf({ startsAt: '999999' }), 'broken'],
  ['an index of eleven digits', pdfOf({ startsAt: '99999999999' }), 'truncated'],
  ['an index that is none', pdfOf({ startsAt: '4' }), 'broken'],
  ['an index without a trailer', latin(text.replace('trailer', 'trail  ')), 'broken'],
  ['an index stream that is an ordinary object', pdfOf({ startsAt: String(text.indexOf('1 0 obj')) }), 'broken'],
  ['no root', pdfOf({ trailer: '/Size 5' }), 'broken'],
  ['a root that is not there', pdfOf({ trailer: '/Size 5 /Root 77 0 R' }), 'broken'],
  ['an earlier version that is itself', revised(good, String(good.length)), 'broken'],
  ['an earlier version nowhere', revised(good, '9999999'), 'broken'],
  ['two hundred and fifty earlier versions', manyRevisions(250), 'too_much_work'],
  ['an archive behind it', Buffer.concat([good, latin('PK\x03\x04'), Buffer.alloc(64, 65)]), 'more_behind'],
  ['megabytes of something behind it', Buffer.concat([good, Buffer.alloc(3_000_000, 65)]), 'more_behind'],
  ['a password', pdfOf({ trailer: '/Size 5 /Root 1 0 R /Encrypt 9 0 R' }), 'locked'],
  ['a password spelt in hex', pdfOf({ trailer: '/Size 5 /Root 1 0 R /#45ncrypt 9 0 R' }), 'locked'],
  ['a script', withCatalog('/OpenAction << /S /JavaScript /JS (app.alert(1)) >>'), 'active'],
  ['a script spelt in hex', withCatalog('/OpenAction << /S /J#61va#53cript /JS (app.alert(1)) >>'), 'active'],
  ['a script in packed objects', withObject(packedObjects(['<< /S /JavaScript /JS (x) >>'])), 'active'],
  ['a program to start', withCatalog('/OpenAction << /S /Launch /F (calc) >>'), 'active'],
  ['a file inside', withObject(streamOf('MZ', '/Type /EmbeddedFile')), 'active'],
  ['a film', withCatalog('/AA << /S /RichMedia >>'), 'active'],
  ['a form that sends itself', withCatalog('/AA << /S /SubmitForm /F (https://canary.example) >>'), 'active'],
  ['no page', pdfOf({ objects: onePage.slice(0, 2) }), 'no_pages'],
  ['201 pages', pdfOf({ objects: manyPages(201) }), 'too_many_pages'],
  ['packed objects that swell to 48 MB', withObject(bomb), 'too_much_work'],
  ['packed objects that are noise', withObject(packedObjects(['<< >>'], (b) => b.fill(0xa7))), 'broken'],
  [
    'packed objects in a packing nobody uses',
    withObject(streamOf('x', '/Type /ObjStm /Filter /LZWDecode')),
    'too_much_work',
  ],
  ['a stream without an end', withObject('<< /Length 5 >>\nstream\nnothing ends this'), 'truncated'],
  ['a frame of 17 MB', withObject(`(${'a'.repeat(17 * 1024 * 1024)})`), 'too_much_work'],
  ['a hundred thousand streams and more', withObject('stream\nendstream\n'.repeat(100_010)), 'too_much_work'],
];

/** Files that are no PDF to be signed, each with what is wrong with it. */
export const hostilePdfs: HostilePdf[] = rows.map(([name, bytes, outcome]) => ({ name, bytes, outcome }));
