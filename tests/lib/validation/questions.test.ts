import { describe, expect, test } from 'vitest';
import { awayForm, newLetter, newQuestion, penPass, savedPhrase, topicForm } from '@/lib/validation/questions';

const paragraph = (...content: unknown[]) => ({ type: 'doc', content: [{ type: 'paragraph', content }] });
const words = (text: string, marks?: unknown[]) => ({ type: 'text', text, ...(marks ? { marks } : {}) });
const letter = (note: unknown, over: object = {}) => ({ note, idempotencyKey: 'a-letter-sent-once', ...over });
const refusals = (result: { success: boolean; error?: { issues: { message: string }[] } }) =>
  result.error?.issues.map(({ message }) => message) ?? [];

describe('a letter as it arrives', () => {
  test('keeps markup as the words it is', () => {
    const text = '<script>alert(1)</script><img src=x onerror=alert(1)>';
    const parsed = newLetter.parse(letter(paragraph(words(text))));
    expect(parsed.note.text).toBe(text);
    expect(parsed.note.doc).toEqual(paragraph(words(text)));
    expect(parsed.photos).toEqual([]);
  });

  test.each([
    [
      'a link that runs a script',
      paragraph(words('click', [{ type: 'link', attrs: { href: 'javascript:alert(1)' } }])),
    ],
    ['a node of another kind', { type: 'doc', content: [{ type: 'iframe', attrs: { src: 'https://example.com' } }] }],
    ['markup where a document belongs', '<p>Hello</p>'],
    ['nothing', paragraph()],
  ])('with %s carries none of it on', (_what, note) => {
    const parsed = newLetter.safeParse(letter(note));
    const kept = JSON.stringify(parsed.success ? parsed.data.note.doc : null);
    expect(kept).not.toMatch(/javascript|iframe|<p>/);
  });

  test('with thirteen photos, an unknown field or a short key is refused', () => {
    const photos = Array.from({ length: 13 }, (_, n) => ({ id: `photo-${n}`, alt: '' }));
    const note = paragraph(words('Hello'));
    expect(refusals(newLetter.safeParse(letter(note, { photos })))).toEqual([
      'A letter holds at most 12 photos. Send the rest in a second one.',
    ]);
    expect(newLetter.safeParse(letter(note, { side: 'shop' })).success).toBe(false);
    expect(newLetter.safeParse(letter(note, { idempotencyKey: 'short' })).success).toBe(false);
  });

  test('a subject is one line without control characters', () => {
    const asked = { orderNumber: 'Q-1', entryId: null, topicId: 'finish', ...letter(paragraph(words('Hello'))) };
    const { subject } = newQuestion.parse({ ...asked, subject: 'Fret wire\r\nBcc: all@example.com\u202e' });
    expect(subject).not.toMatch(/[\r\n\u202e]/);
  });
});

describe('forms about questions', () => {
  test('the pen is passed with a reason', () => {
    const pass = { questionId: 'q', toId: 'somebody' };
    expect(penPass.parse({ ...pass, reason: ' You see\nit better ' }).reason).toBe('You see it better');
    expect(refusals(penPass.safeParse({ ...pass, reason: ' \n' }))).toHaveLength(1);
  });

  test.each([
    { form: { from: '2026-12-24', until: '2026-12-27' }, fine: true },
    { form: { from: '2026-12-24', until: '' }, fine: true },
    { form: { from: '', until: '' }, fine: true },
    { form: { from: '2026-12-24', until: '2026-12-23' }, fine: false },
    { form: { from: '', until: '2026-12-23' }, fine: false },
    { form: { from: '2026-02-30', until: '' }, fine: false },
    { form: { from: 'tomorrow', until: '' }, fine: false },
  ])('days away $form.from to $form.until are fine: $fine', ({ form, fine }) => {
    expect(awayForm.safeParse(form).success).toBe(fine);
  });

  test.each(['0', '201', '1.5', 'soon', ''])('an answer due in %s hours is refused with one sentence', (dueHours) => {
    expect(refusals(topicForm.safeParse({ name: 'Money', answers: 'rep', dueHours }))).toHaveLength(1);
  });

  test('a phrase keeps its lines and its braces', () => {
    const kept = savedPhrase.parse({ title: 'Soon', words: ' {owner},\r\nsoon. ', whose: 'mine' });
    expect(kept).toEqual({ phraseId: '', title: 'Soon', words: '{owner},\nsoon.', whose: 'mine' });
    expect(savedPhrase.safeParse({ title: 'Soon', words: 'x', whose: 'everybody' }).success).toBe(false);
  });
});
