import type { WatchedMail } from '@/db/queries/mail-watch';

type MailState = WatchedMail['state'];

const figures: { state: MailState; words: string; isTrouble?: boolean }[] = [
  { state: 'waiting', words: 'waiting' },
  { state: 'sending', words: 'being sent' },
  { state: 'sent', words: 'sent' },
  { state: 'failed', words: 'failed', isTrouble: true },
  { state: 'parked', words: 'parked', isTrouble: true },
  { state: 'dropped', words: 'dropped unsent' },
];

/** How much mail is in which state. */
export function MailCounts({ counts }: { counts: { state: MailState; n: number }[] }) {
  const countOf = (state: MailState) => counts.find((row) => row.state === state)?.n ?? 0;
  return (
    <dl className="flex flex-wrap gap-x-10 gap-y-4">
      {figures.map(({ state, words, isTrouble }) => (
        <div key={state} className="flex flex-col-reverse">
          <dt className="text-sm text-soft">{words}</dt>
          <dd className={`heading text-2xl ${isTrouble && countOf(state) > 0 ? 'text-late' : ''}`}>{countOf(state)}</dd>
        </div>
      ))}
    </dl>
  );
}
