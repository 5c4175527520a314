import { getDocument, OPS } from 'pdfjs-dist/legacy/build/pdf.mjs';
import sharp from 'sharp';
import { afterAll, expect, test } from 'vitest';
import { asBuiltSheet, type AsBuiltFacts } from '@/lib/as-built/sheet';
import { renderPaper, stopSetting } from '@/lib/as-built/render-paper';
import type { ProofLine } from '@/lib/specs/proof';

afterAll(stopSetting);

const NOW_MS = Date.UTC(2026, 11, 1, 9);

const photo = (id: string, entryId: string) => ({
  id,
  entryId,
  jpegKey: `out/${id}/mail.jpg`,
  alt: '',
  widthPx: 560,
  heightPx: 420,
  datedAt: NOW_MS,
  stageName: 'Neck',
});

function line(key: string, over: Partial<ProofLine> = {}): ProofLine {
  const base = { key, group: 'neck', label: `Item ${key}`, frozenFrom: null, provenAt: null } as const;
  return {
    item: { ...base, kind: 'choice', value: 'Bolted', options: [] },
    state: 'proven',
    signed: 'Bolted',
    measured: null,
    withinWords: null,
    proofs: [
      { entryId: 'one', datedAt: NOW_MS, stageName: 'Neck', authorName: 'Bo Lindgren', photoId: 'a', isForOwner: true },
    ],
    waitsForSignOff: null,
    concession: null,
    ...over,
  };
}

const facts = (over: Partial<AsBuiltFacts> = {}): AsBuiltFacts => ({
  shopName: 'Quillhaven Guitar Works',
  orderNumber: 'Q-2417',
  instrument: 'Nightjar baritone',
  finishName: 'Tidepool burst',
  finishHex: '#007a84',
  ownerName: 'Mara Okafor',
  readyAt: NOW_MS,
  shippedAt: null,
  shippedBy: null,
  deliveredAt: null,
  version: { number: 4, signedAt: NOW_MS, signedName: 'Mara Okafor' },
  lines: [line('joint'), line('scale', { signed: '27 in', measured: '27.002 in', withinWords: 'within ± 0.005 in' })],
  drawings: [],
  setUp: [{ key: 'relief', label: 'Relief', figures: '0.008 in', words: 'within', datedAt: NOW_MS, authorName: 'Ida' }],
  papers: ['Ebony'],
  photos: [photo('a', 'one'), photo('b', 'one'), photo('c', 'two')],
  ...over,
});

async function pictureOf(shade: number): Promise<Buffer> {
  const background = { r: shade, g: 90, b: 60 };
  return sharp({ create: { width: 56, height: 42, channels: 3, background } })
    .jpeg()
    .toBuffer();
}

async function readPaper(over: Partial<AsBuiltFacts> = {}, read?: (key: string) => Promise<Buffer>) {
  const shades: Record<string, number> = { 'out/a/mail.jpg': 20, 'out/b/mail.jpg': 120, 'out/c/mail.jpg': 220 };
  const made = await renderPaper(
    asBuiltSheet(facts(over), 'UTC', NOW_MS),
    read ?? ((key) => pictureOf(shades[key] ?? 0)),
    NOW_MS,
  );
  const pdf = await getDocument({ data: made.slice(), useSystemFonts: false, verbosity: 0 }).promise;
  const pages: string[] = [];
  let pictures = 0;
  for (let number = 1; number <= pdf.numPages; number++) {
    const page = await pdf.getPage(number);
    const { items } = await page.getTextContent();
    pages.push(items.map((item) => ('str' in item ? item.str : '')).join(' '));
    pictures += (await page.getOperatorList()).fnArray.filter((op) => op === OPS.paintImageXObject).length;
  }
  const { info } = await pdf.getMetadata();
  return { text: pages.join('\n').replace(/\s+/g, ' '), pages, pictures, info, bytes: made };
}

/** How many pictures the file itself holds. */
const heldPictures = (bytes: Uint8Array) => Buffer.from(bytes).toString('latin1').split('/Subtype /Image').length - 1;

test('the sheet says what was signed, what was measured, who showed it and when', async () => {
  const { text } = await readPaper();
  for (const words of [
    'As signed, as built',
    'Nightjar baritone',
    'Order Q-2417',
    'Version 4, signed by Mara Okafor on 1 December',
    '27 in',
    '27.002 in',
    'within ± 0.005 in',
    '1 December, Neck, Bo Lindgren',
    'Relief',
    'Changing strings',
    'Truss rod',
    'Ebony',
  ])
    expect(text).toContain(words);
});

test('a length stands in both unit systems, a count in none', async () => {
  const measure = { ...line('m').item, kind: 'measure', tolerance: null } as const;
  const action = { ...measure, aim: { text: '4', unit: '64ths' } } as const;
  const frets = { ...measure, aim: { text: '22', unit: 'count' } } as const;
  const { text } = await readPaper({
    lines: [
      line('action', { item: action, signed: '4/64 in', measured: '5/64 in' }),
      line('frets', { item: frets, signed: '22', measured: '22' }),
    ],
  });
  expect(text).toContain('4/64 in (1.588 mm)');
  expect(text).toContain('5/64 in (1.984 mm)');
  expect(text).not.toContain('22 in');
});

test('an item that was signed as a drawing names it', async () => {
  const look = { ...line('logo').item, kind: 'look', words: 'shell', documentId: 'd1', colour: null } as const;
  const drawings = [{ id: 'd1', title: 'Headstock logo, drawing 2', photoId: null, createdAt: NOW_MS }];
  const { text } = await readPaper({ drawings, lines: [line('logo', { item: look, signed: 'shell' })] });
  expect(text).toContain('see “Headstock logo, drawing 2”');
});

test('every photo is in it, and each picture once', async () => {
  const { pictures, bytes, text } = await readPaper();
  expect(pictures).toBe(3);
  expect(heldPictures(bytes)).toBe(3);
  expect(text).toContain('photo 1');
});

test('it has a title, a language and numbered pages', async () => {
  const { info, pages } = await readPaper({ lines: Array.from({ length: 40 }, (_, i) => line(`n${i}`)) });
  expect(info).toMatchObject({ Title: 'Nightjar baritone, Q-2417: as signed, as built', Language: 'en' });
  expect(pages.length).toBeGreaterThan(1);
  pages.forEach((page, index) => expect(page).toContain(`Page ${index + 1} of ${pages.length}`));
});

test('a picture that cannot be read, or is none, is left out and the sheet still made', async () => {
  const read = (key: string) =>
    key.includes('/a/')
      ? Promise.reject(new Error('gone'))
      : key.includes('/b/')
        ? Promise.resolve(Buffer.from('<svg onload="alert(1)"/>'))
        : pictureOf(1);
  const { pictures, text } = await readPaper({}, read);
  expect(pictures).toBe(1);
  expect(text).toContain('27.002 in');
});

test('a letter of another script keeps its shape; one that no font has is a question mark, not another letter', async () => {
  const { text } = await readPaper({ instrument: 'Łódź Σκάλα Ночь ΔE F♯ 漢字 😀' });
  expect(text.replaceAll(' ', '')).toContain('ŁódźΣκάλαНочьΔEF#??');
});

test.each([
  { what: 'that turns the direction of what follows', name: '\u202eevil\u0000name' },
  { what: 'without an end', name: 'w'.repeat(4000) },
  { what: 'of markup', name: '<script>alert(1)</script>' },
  { what: 'of nothing', name: '' },
  { what: 'that looks like a piece of the file', name: ') Tj endobj %%EOF' },
])('a name $what does no harm', async ({ name }) => {
  const { pages, text } = await readPaper({ instrument: name, ownerName: name, lines: [line('x', { signed: name })] });
  expect(pages.length).toBeGreaterThan(0);
  expect(text).not.toContain('\u202e');
  expect(text).toContain('As signed, as built');
  expect(text).toContain('Truss rod');
});
