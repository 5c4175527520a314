import { Document, Page, renderToBuffer, Text } from '@react-pdf/renderer';
import { createElement as h } from 'react';
import { describe, expect, test } from 'vitest';
import { MAX_PDF_BYTES } from '@/lib/documents/limits';
import { checkPdf } from '@/lib/documents/pdf-check';
import { PDF_REFUSALS } from '@/lib/documents/refusals';
import { hostilePdfs } from '@/tests/support/hostile-pdfs';
import { indexPlace, onePage, packedObjects, pdfOf, streamOf } from '@/tests/support/pdf-bytes';

/** Objects and index both in streams, as programs write PDF 1.5 and later (ISO 32000-1, 7.5.8). */
function packedPdf(): Buffer {
  const body = `%PDF-1.5\n5 0 obj\n${packedObjects(onePage.slice(0, 3))}\nendobj\n`;
  const index = streamOf(Buffer.alloc(24), '/Type /XRef /Size 6 /Root 1 0 R /W [1 2 1] /Index [0 6]');
  return Buffer.from(`${body}6 0 obj\n${index}\nendobj\nstartxref\n${body.length}\n%%EOF`, 'latin1');
}

describe('a PDF to be signed is taken', () => {
  test('as it is written by hand, with its pages counted', async () => {
    expect(await checkPdf(pdfOf())).toEqual({ ok: true, pages: 1 });
  });

  test('with objects and index packed away', async () => {
    expect(await checkPdf(packedPdf())).toEqual({ ok: true, pages: 1 });
  });

  test('with an earlier version behind it', async () => {
    const first = pdfOf();
    const index = `xref\n0 0\ntrailer\n<< /Size 5 /Root 1 0 R /Prev ${indexPlace(first)} >>\nstartxref\n${first.length}\n%%EOF\n`;
    expect(await checkPdf(Buffer.concat([first, Buffer.from(index)]))).toEqual({ ok: true, pages: 1 });
  });

  test('as the shop’s own sheets are made', async () => {
    const pages = [1, 2, 3].map((page) => h(Page, { key: page }, h(Text, null, `Sheet ${page}`)));
    expect(await checkPdf(await renderToBuffer(h(Document, null, pages)))).toEqual({ ok: true, pages: 3 });
  });

  test('when words that mean something else stand inside a drawing', async () => {
    const drawing = streamOf('(/JavaScript /Launch /Encrypt 201 x /Type /Page) Tj');
    expect(await checkPdf(pdfOf({ objects: [...onePage.slice(0, 3), drawing] }))).toEqual({ ok: true, pages: 1 });
  });

  test('with line breaks behind its end, as some programs leave them', async () => {
    expect(await checkPdf(pdfOf({ end: '%%EOF\r\n\r\n' }))).toEqual({ ok: true, pages: 1 });
  });
});

describe('a file is refused with its sentence', () => {
  test.each(hostilePdfs)('when it holds $name', async ({ bytes, outcome }) => {
    expect(await checkPdf(bytes)).toEqual({ ok: false, code: outcome, message: PDF_REFUSALS[outcome] });
  });

  test('when it is a byte over the limit', async () => {
    expect(await checkPdf(Buffer.alloc(MAX_PDF_BYTES + 1))).toMatchObject({ ok: false, code: 'too_large' });
  });

  test('within two seconds, though it be 50 MB of pages without end', async () => {
    const part = Buffer.from('/Type /Page stream ', 'latin1');
    const middle = Buffer.alloc(MAX_PDF_BYTES - 2000, part);
    const good = pdfOf();
    const start = good.indexOf('xref\n');
    const bytes = Buffer.concat([
      good.subarray(0, start),
      middle,
      Buffer.from(
        good
          .subarray(start)
          .toString('latin1')
          .replace(/startxref\n\d+/, `startxref\n${start + middle.length}`),
      ),
    ]);
    const before = performance.now();
    expect(await checkPdf(bytes)).toMatchObject({ ok: false, code: 'too_much_work' });
    expect(performance.now() - before).toBeLessThan(2000);
  });
});

test('every sentence ends as one and says what to do', () => {
  for (const sentence of Object.values(PDF_REFUSALS)) expect(sentence).toMatch(/^[A-Z].*(?:[Cc]hoose|Send) .*\.$/);
});
