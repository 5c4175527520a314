import { describe, expect, test } from 'vitest';
import { draftReducer, problemOf, readyPhotos, type Draft, type DraftEvent } from '@/components/bench/draft-state';
import type { Posting } from '@/components/bench/posting-state';
import { blankDraft, fromKept, toKept } from '@/components/bench/kept-draft';
import { eventOf, NO_SIGNAL } from '@/components/bench/post-entry';
import { editStateOf } from '@/components/bench/save-edit';
import { stageOf } from '@/components/bench/stage-choice';
import type { UploadFile } from '@/lib/photos/upload-walk';
import { plainNote } from '@/lib/rich-text/plain-text';

const file = (uploadKey: string): UploadFile => ({
  uploadKey,
  name: 'bench.jpg',
  contentType: 'image/jpeg',
  blob: new Blob([uploadKey]),
});

const run = (draft: Draft, ...events: DraftEvent[]) => events.reduce(draftReducer, draft);
const withPhotos = (...keys: string[]) => run(blankDraft('key-1'), { type: 'photos-chosen', files: keys.map(file) });
const ready = (uploadKey: string): DraftEvent => ({
  type: 'photo-moved',
  uploadKey,
  upload: { step: 'ready', photoId: `id-${uploadKey}` },
});
const unanswered: DraftEvent = { type: 'send-kept', message: NO_SIGNAL, isSignedOut: false, mayHaveArrived: true };

describe('photos of a draft', () => {
  test('are handed to the diary in the order they were chosen, each with its words, once all are there', () => {
    const described = run(withPhotos('a', 'b'), ready('b'), {
      type: 'photo-described',
      uploadKey: 'a',
      alt: 'The heel',
    });
    expect(readyPhotos(described)).toBeNull();
    expect(readyPhotos(run(described, ready('a')))).toEqual([
      { id: 'id-a', alt: 'The heel' },
      { id: 'id-b', alt: '' },
    ]);
  });

  test('news of one that was taken out changes nothing', () => {
    const draft = run(withPhotos('a', 'b'), { type: 'photo-removed', uploadKey: 'a' });
    expect(run(draft, ready('a')).photos).toEqual(draft.photos);
  });
});

describe('asking to post', () => {
  test('an empty entry is not asked for', () => {
    expect(problemOf(blankDraft('key-1'))?.fields.note).toMatch(/nothing in it/);
    expect(problemOf(run(blankDraft('key-1'), { type: 'written', note: plainNote('  ') }))).not.toBeNull();
    expect(problemOf(run(blankDraft('key-1'), { type: 'written', note: plainNote('Glued.') }))).toBeNull();
    expect(problemOf(withPhotos('a'))).toBeNull();
  });

  test('what was said about a field goes with the next change of that field', () => {
    const problem = { message: 'Look again.', fields: { note: 'Empty.', stageId: 'Choose one.' } };
    const draft = run(
      blankDraft('key-1'),
      { type: 'send-refused', problem },
      { type: 'written', note: plainNote('x') },
    );
    expect(draft.posting).toEqual({
      step: 'writing',
      problem: { fields: { note: undefined, stageId: 'Choose one.' }, isTouched: true },
    });
  });

  test.each<{ to: string; posting: Posting }>([
    { to: 'kept', posting: { step: 'kept', message: '', isSignedOut: false, wasSent: false } },
    { to: 'sending', posting: { step: 'sending', wasSent: false } },
    { to: 'posted', posting: { step: 'posted', entryId: 'e', isHeld: false } },
  ])('an entry that is $to does not change under the sender’s hands', ({ posting }) => {
    const draft = { ...withPhotos('a'), posting };
    const after = run(
      draft,
      { type: 'written', note: plainNote('other words') },
      { type: 'audience-chosen', audience: 'shop' },
      { type: 'photo-removed', uploadKey: 'a' },
    );
    expect(after).toEqual(draft);
  });

  test('may be taken back until a try has gone out unanswered', () => {
    const asked = run(withPhotos('a'), { type: 'post-asked' });
    expect(run(asked, { type: 'post-taken-back' }).posting.step).toBe('writing');
    const sent = run(asked, { type: 'send-began' }, unanswered);
    expect(run(sent, { type: 'post-taken-back' }).posting.step).toBe('kept');
  });

  test('a try that went unanswered is remembered through a later sign-out', () => {
    const signedOut: DraftEvent = { type: 'send-kept', message: '', isSignedOut: true, mayHaveArrived: false };
    const draft = run(
      withPhotos('a'),
      { type: 'post-asked' },
      { type: 'send-began' },
      unanswered,
      { type: 'send-began' },
      signedOut,
    );
    expect(draft.posting).toMatchObject({ step: 'kept', isSignedOut: true, wasSent: true });
  });

  test('a photo refused in the meantime gives the entry back to its writer', () => {
    const upload = { step: 'refused', message: 'Not a photo.' } as const;
    const draft = run(withPhotos('a'), { type: 'post-asked' }, { type: 'photo-moved', uploadKey: 'a', upload });
    expect(draft.posting).toMatchObject({ step: 'writing', problem: { fields: { photos: expect.any(String) } } });
  });
});

describe('a kept draft', () => {
  const written = run(
    withPhotos('a', 'b'),
    { type: 'written', note: plainNote('Second coat.') },
    { type: 'audience-chosen', audience: 'shop' },
    { type: 'stage-chosen', stageId: 'finish' },
    { type: 'start-chosen', startStage: true },
    { type: 'photo-described', uploadKey: 'b', alt: 'The back' },
    ready('b'),
  );
  const kept = (draft: Draft) => ({ draft: structuredClone(toKept(draft)), photos: ['b', 'a'].map(file) });

  test('comes back with everything in it, in order, under the same idempotency key', () => {
    const back = fromKept(kept(written), 'another-key');
    expect(back).toMatchObject({
      idempotencyKey: 'key-1',
      note: written.note,
      stageId: 'finish',
      startStage: true,
      audience: 'shop',
      posting: { step: 'writing' },
    });
    expect(back.photos.map(({ uploadKey, alt, photoId }) => ({ uploadKey, alt, photoId }))).toEqual([
      { uploadKey: 'a', alt: '', photoId: undefined },
      { uploadKey: 'b', alt: 'The back', photoId: 'id-b' },
    ]);
  });

  test.each([
    { how: 'to be posted', events: [{ type: 'post-asked' }], wasSent: false },
    {
      how: 'caught by a crash while it was sent',
      events: [{ type: 'post-asked' }, { type: 'send-began' }],
      wasSent: true,
    },
    { how: 'unanswered', events: [{ type: 'post-asked' }, { type: 'send-began' }, unanswered], wasSent: true },
  ] satisfies { how: string; events: DraftEvent[]; wasSent: boolean }[])(
    '$how goes on being sent',
    ({ events, wasSent }) => {
      expect(fromKept(kept(run(written, ...events)), 'x').posting).toMatchObject({ step: 'kept', wasSent });
    },
  );

  test('whose words are damaged still brings its photos back', () => {
    const damaged = { ...kept(written), draft: { ...toKept(written), note: { type: 'doc', content: 7 } } };
    const back = fromKept(damaged, 'x');
    expect(back.note).toBeNull();
    expect(back.photos).toHaveLength(2);
  });

  test('photos chosen just before a crash are found without it', () => {
    const back = fromKept({ photos: [file('a')] }, 'fresh-key');
    expect(back.photos.map(({ uploadKey }) => uploadKey)).toEqual(['a']);
    expect(back.idempotencyKey).toBe('fresh-key');
  });
});

describe('what an answer means for the draft', () => {
  test('posted, and whether it waits for a rep', () => {
    expect(eventOf({ kind: 'ok', body: { id: 'e1', state: 'held' } })).toEqual({
      type: 'posted',
      entryId: 'e1',
      isHeld: true,
    });
  });

  test.each([
    { what: 'silence', answer: { kind: 'no-signal' } as const, over: { mayHaveArrived: true, message: NO_SIGNAL } },
    { what: 'a fault of the shop', answer: { kind: 'status', status: 500 } as const, over: { mayHaveArrived: true } },
    { what: 'too many', answer: { kind: 'status', status: 429 } as const, over: { mayHaveArrived: false } },
    {
      what: 'signed out',
      answer: { kind: 'status', status: 401 } as const,
      over: { isSignedOut: true, mayHaveArrived: false },
    },
  ])('$what: kept and tried again', ({ answer, over }) => {
    expect(eventOf(answer)).toMatchObject({ type: 'send-kept', ...over });
  });

  test('422: each sentence at its field, one without a field by the button', () => {
    const fields = { note: 'Too long.', 'photos.0.alt': 'Too many words.', orderNumber: 'Unknown.' };
    expect(eventOf({ kind: 'status', status: 422, message: 'Look again.', fields })).toEqual({
      type: 'send-refused',
      problem: { message: 'Unknown.', fields: { note: 'Too long.', photos: 'Too many words.' } },
    });
  });
});

describe('saving an edit', () => {
  test('409 shows the shop’s own sentence', () => {
    expect(editStateOf({ kind: 'status', status: 409, message: 'Somebody saved.' })).toEqual({
      step: 'conflict',
      message: 'Somebody saved.',
    });
  });

  test('422 puts the sentence at the note', () => {
    expect(editStateOf({ kind: 'status', status: 422, message: 'Look.', fields: { note: 'Too long.' } })).toMatchObject(
      {
        note: 'Too long.',
      },
    );
  });
});

describe('the stage of an entry', () => {
  const stages = [
    { id: 'wood', name: 'Wood', state: 'done' as const },
    { id: 'neck', name: 'Neck', state: 'now' as const },
    { id: 'finish', name: 'Finish', state: 'ahead' as const },
  ];

  test.each([
    { chosen: null, expected: 'neck' },
    { chosen: 'finish', expected: 'finish' },
    { chosen: 'a stage of another build', expected: 'neck' },
  ])('chosen $chosen: $expected', ({ chosen, expected }) => {
    expect(stageOf(stages, chosen)).toBe(expected);
  });

  test('a build not begun is at its first stage, a finished one at its last', () => {
    const all = (state: 'done' | 'ahead') => stages.map((stage) => ({ ...stage, state }));
    expect([stageOf(all('ahead'), null), stageOf(all('done'), null), stageOf([], null)]).toEqual([
      'wood',
      'finish',
      '',
    ]);
  });
});
