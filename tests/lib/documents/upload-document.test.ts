import { describe, expect, test } from 'vitest';
import { fileRefusal } from '@/lib/documents/choice';
import { pdfFileName } from '@/lib/documents/file-name';
import { MAX_PDF_BYTES } from '@/lib/documents/limits';
import { sizeWords } from '@/lib/documents/size-words';
import { uploadDocument, type DocumentDoors, type DocumentUpload } from '@/lib/documents/upload-document';
import type { Answer } from '@/lib/photos/upload-answer';

const ok = <T>(body: T): Answer<T> => ({ kind: 'ok', body });
const status = (code: number, message?: string): Answer<never> => ({ kind: 'status', status: code, message });
const noSignal: Answer<never> = { kind: 'no-signal' };
const upload = { url: 'https://store.example/in/x', headers: {} };
const granted = ok({ state: 'granted' as const, id: 'd1', upload });

/** A shop and a store that answer in turn with what they are given; the last answer stays. */
function doorsThat(answers: {
  ask?: Awaited<ReturnType<DocumentDoors['ask']>>[];
  send?: Answer<null>[];
  check?: Awaited<ReturnType<DocumentDoors['check']>>[];
  measure?: () => Promise<string>;
}) {
  const asked: string[] = [];
  const pausesMs: number[] = [];
  const next = <T>(list: T[]): T => {
    const [first] = list;
    if (first === undefined) throw new Error('no answer left');
    if (list.length > 1) list.shift();
    return first;
  };
  const doors: DocumentDoors = {
    measure: answers.measure ?? (async () => `${'A'.repeat(43)}=`),
    ask: async ({ uploadKey }) => (asked.push(uploadKey), next(answers.ask ?? [granted])),
    send: async (_link, _blob, onShare) => (onShare(0.5), next(answers.send ?? [ok(null)])),
    check: async () => next(answers.check ?? [ok({ state: 'ready' as const })]),
    pause: async (ms) => void pausesMs.push(ms),
    random: () => 0.5,
  };
  return { doors, asked, pausesMs };
}

async function run(answers: Parameters<typeof doorsThat>[0], signal = new AbortController().signal) {
  const { doors, asked, pausesMs } = doorsThat(answers);
  const seen: DocumentUpload[] = [];
  const file = { orderNumber: 'Q-1', uploadKey: 'one-key', name: 'logo.pdf', blob: new Blob(['%PDF-']) };
  await uploadDocument(file, doors, (step) => seen.push(step), signal);
  return { seen, last: seen.at(-1), asked, pausesMs };
}

describe('a PDF on its way', () => {
  test('is measured, sent and checked, and tells how far it is', async () => {
    const { seen } = await run({});
    expect(seen).toEqual([
      { step: 'measuring' },
      { step: 'sending', share: 0 },
      { step: 'sending', share: 0.5 },
      { step: 'checking' },
      { step: 'ready', documentId: 'd1' },
    ]);
  });

  test.each([
    ['no signal at the shop', { ask: [noSignal, granted] }],
    ['a shop that is busy', { ask: [status(503), granted] }],
    ['no signal at the store', { send: [noSignal, ok(null)] }],
    ['a link that was too old', { send: [status(403), ok(null)] }],
    ['bytes that had not arrived', { check: [ok({ state: 'missing' as const }), ok({ state: 'ready' as const })] }],
    ['a check that was cut off', { check: [noSignal, ok({ state: 'ready' as const })] }],
  ])('comes through after %s, under the same key', async (_, answers) => {
    const { last, asked, pausesMs } = await run(answers);
    expect(last).toEqual({ step: 'ready', documentId: 'd1' });
    expect(new Set(asked)).toEqual(new Set(['one-key']));
    expect(pausesMs).toHaveLength(1);
  });

  test('that arrived before is not sent again', async () => {
    const { seen } = await run({ ask: [ok({ state: 'ready' as const, id: 'd1' })], send: [status(500)] });
    expect(seen.at(-1)).toEqual({ step: 'ready', documentId: 'd1' });
    expect(seen.some(({ step }) => step === 'sending')).toBe(false);
  });

  test('whose bytes lie there already goes on to the check', async () => {
    expect((await run({ send: [status(412)] })).last).toEqual({ step: 'ready', documentId: 'd1' });
  });

  test.each([
    ['refused by the check', { check: [ok({ state: 'refused' as const, message: 'No PDF.' })] }],
    ['refused before', { ask: [ok({ state: 'refused' as const, id: 'd1', message: 'No PDF.' })] }],
    ['refused at its field', { ask: [{ kind: 'status' as const, status: 422, fields: { sizeBytes: 'No PDF.' } }] }],
  ])('%s ends with the sentence, and is not tried again', async (_, answers) => {
    const { last, asked } = await run(answers);
    expect(last).toEqual({ step: 'refused', message: 'No PDF.' });
    expect(asked).toHaveLength(1);
  });

  test('is given up after six tries, with a sentence', async () => {
    const { last, asked } = await run({ send: [status(500)] });
    expect(last).toMatchObject({ step: 'failed' });
    expect(asked).toHaveLength(6);
  });

  test('that cannot be read says so', async () => {
    const { last } = await run({ measure: () => Promise.reject(new Error('gone')) });
    expect(last).toEqual({ step: 'failed', message: 'This file could not be read. Choose it again.' });
  });

  test('is silent once it was given up', async () => {
    const leaving = new AbortController();
    leaving.abort();
    expect((await run({}, leaving.signal)).seen).toEqual([]);
  });
});

describe('a chosen file', () => {
  const head = (text: string) => new Uint8Array(Buffer.from(text.padEnd(32, '\0'), 'latin1'));

  test.each([
    ['a PDF', head('%PDF-1.7'), 10, null],
    ['a photo', head('\xff\xd8\xff\xe0'), 10, null],
    ['an empty file', head(''), 0, /^This file is empty/],
    ['a PDF over the limit', head('%PDF-1.7'), MAX_PDF_BYTES + 1, /over 50 MB/],
    ['anything else', head('PK\x03\x04'), 10, /neither a PDF nor a photo/],
  ])('that is %s', (_, bytes, size, says) => {
    const refusal = fileRefusal(bytes, size);
    if (says === null) expect(refusal).toBeNull();
    else expect(refusal).toMatch(says);
  });
});

test.each([
  ['Headstock logo, drawing 3', 'Q-1 Headstock logo drawing 3.pdf'],
  ['"; filename=x.exe\r\nX: y', 'Q-1 filenamexexe X y.pdf'],
  ['../../etc/passwd', 'Q-1 etcpasswd.pdf'],
  ['Ünïcödé', 'Q-1 Unicode.pdf'],
  ['字', 'Q-1.pdf'],
])('a drawing called %j is saved as %s', (title, name) => expect(pdfFileName('Q-1', title)).toBe(name));

test.each([
  [1, '1 KB'],
  [655_360, '640 KB'],
  [1_468_006, '1.4 MB'],
  [52_428_800, '50 MB'],
])('%i bytes are %s', (bytes, words) => expect(sizeWords(bytes)).toBe(words));
