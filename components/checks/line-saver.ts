import { isPassing, type Answer } from '@/lib/photos/upload-answer';
import { retryDelay } from '@/lib/photos/upload-delay';
import type { MarkedLine } from '@/lib/validation/checks';

export type Saving =
  | { step: 'fresh' }
  | { step: 'saving' }
  | { step: 'saved' }
  /** No signal, or the shop is busy: it is tried again by itself. */
  | { step: 'waiting' }
  | { step: 'refused'; message: string };

type SaverParts = {
  send: (line: MarkedLine) => Promise<Answer<object>>;
  onChange: (saving: Saving) => void;
  /** Resolves after `ms` or when aborted. */
  pause: (ms: number, signal: AbortSignal) => Promise<void>;
  random: () => number;
};

/** Carries one line's latest mark to the shop: one call at a time, what was chosen in between last, silence tried again. */
export function createLineSaver({ send, onChange, pause, random }: SaverParts) {
  let wanted: MarkedLine | null = null;
  let isUnderWay = false;
  let waking = new AbortController();
  let isStopped = false;

  async function carry(): Promise<void> {
    isUnderWay = true;
    for (let tries = 0; wanted !== null && !isStopped;) {
      const line: MarkedLine = wanted;
      onChange({ step: 'saving' });
      const answer = await send(line);
      if (answer.kind === 'no-signal' || (answer.kind === 'status' && isPassing(answer.status))) {
        onChange({ step: 'waiting' });
        waking = new AbortController();
        await pause(retryDelay(tries++, random()), waking.signal);
        continue;
      }
      tries = 0;
      if (wanted !== line) continue;
      wanted = null;
      onChange(answer.kind === 'ok' ? { step: 'saved' } : { step: 'refused', message: refusalIn(answer) });
    }
    isUnderWay = false;
  }

  return {
    save(line: MarkedLine): void {
      wanted = line;
      waking.abort();
      if (!isUnderWay) void carry();
    },
    /** Ends the wait: the signal may be back. */
    wake: () => waking.abort(),
    stop(): void {
      isStopped = true;
      waking.abort();
    },
  };
}

const refusalIn = ({ message, fields }: Extract<Answer<object>, { kind: 'status' }>) =>
  Object.values(fields ?? {})[0] ?? message ?? 'This was not taken. Load the page again and mark the line once more.';
