import { describe, expect, test } from 'vitest';
import { createLineSaver, type Saving } from '@/components/checks/line-saver';
import type { Answer } from '@/lib/photos/upload-answer';
import type { CheckMark, MarkedLine } from '@/lib/validation/checks';

const line = (mark: CheckMark): MarkedLine => ({ lineId: 'edges', mark, note: '', photoId: null });
const ok: Answer<object> = { kind: 'ok', body: {} };
const silence: Answer<object> = { kind: 'no-signal' };

/** A shop that answers what it is told to, one call at a time, and a clock that waits until it is let go. */
function scene() {
  const sent: CheckMark[] = [];
  const seen: Saving['step'][] = [];
  const answers: ((answer: Answer<object>) => void)[] = [];
  const waits: (() => void)[] = [];
  const saver = createLineSaver({
    send: ({ mark }) => {
      sent.push(mark);
      return new Promise((resolve) => answers.push(resolve));
    },
    onChange: ({ step }) => seen.push(step),
    pause: (_ms, signal) =>
      new Promise((resolve) => {
        waits.push(resolve);
        signal.addEventListener('abort', () => resolve());
      }),
    random: () => 0.5,
  });
  const settle = () => new Promise((resolve) => setTimeout(resolve));
  const answer = async (what: Answer<object>) => {
    answers.shift()?.(what);
    await settle();
  };
  return { saver, sent, seen, answer, waits, settle };
}

describe('a marked line', () => {
  test('is saved with one call', async () => {
    const { saver, sent, seen, answer } = scene();
    saver.save(line('pass'));
    await answer(ok);
    expect(sent).toEqual(['pass']);
    expect(seen.at(-1)).toBe('saved');
  });

  test('that is changed while it is being saved ends as it was chosen last, one call at a time', async () => {
    const { saver, sent, seen, answer } = scene();
    saver.save(line('pass'));
    saver.save(line('fail'));
    saver.save(line('not_applicable'));
    expect(sent).toEqual(['pass']);
    await answer(ok);
    await answer(ok);
    expect(sent).toEqual(['pass', 'not_applicable']);
    expect(seen.at(-1)).toBe('saved');
  });

  test('is sent again after silence, until the shop answers', async () => {
    const { saver, sent, seen, answer, waits, settle } = scene();
    saver.save(line('pass'));
    await answer(silence);
    expect(seen.at(-1)).toBe('waiting');
    waits.shift()?.();
    await settle();
    await answer({ kind: 'status', status: 503 });
    saver.wake();
    await settle();
    await answer(ok);
    expect(sent).toEqual(['pass', 'pass', 'pass']);
    expect(seen.at(-1)).toBe('saved');
  });

  test('that is changed while there is no signal goes out at once, as it is now', async () => {
    const { saver, sent, answer, settle } = scene();
    saver.save(line('pass'));
    await answer(silence);
    saver.save(line('fail'));
    await settle();
    await answer(ok);
    expect(sent).toEqual(['pass', 'fail']);
  });

  test('that is refused says why and is not sent again', async () => {
    const { saver, sent, seen, answer } = scene();
    saver.save(line('pass'));
    await answer({ kind: 'status', status: 409, message: 'This list is finished.' });
    expect(sent).toEqual(['pass']);
    expect(seen.at(-1)).toBe('refused');
  });
});
