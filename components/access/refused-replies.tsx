import type { RefusedReply } from '@/db/queries/mail-watch';
import { clockWords, dayWords } from '@/lib/date-words';

type RefusedRepliesProps = { replies: RefusedReply[]; zone: string; nowMs: number };

/** Answers by mail that did not become letters, and why; what they said was not kept. */
export function RefusedReplies({ replies, zone, nowMs }: RefusedRepliesProps) {
  return (
    <ul role="list" className="border-t-2 border-ink">
      {replies.map(({ id, note, person, receivedAt }) => (
        <li key={id} className="grid gap-x-8 gap-y-1 border-b border-line py-3 md:grid-cols-[15rem_minmax(0,1fr)]">
          <div>
            <p className="font-semibold">{person ? <bdi>{person}</bdi> : 'Nobody we know'}</p>
            <p className="text-sm text-soft">
              {dayWords(receivedAt, zone, nowMs)} at {clockWords(receivedAt, zone)}
            </p>
          </div>
          <p className="min-w-0 break-words">{note}</p>
        </li>
      ))}
    </ul>
  );
}
