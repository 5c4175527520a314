import Link from 'next/link';
import { signOffHref } from './sign-off-list';
import type { WaitingSignOff } from '@/db/queries/sign-offs';
import { blockWords, waitWords } from '@/lib/sign-offs/wait-words';

type WaitingLinesProps = { waiting: WaitingSignOff[]; today: string; nowMs: number };

const SHOWN = 2;
const linkClass = '-my-1 inline-block py-2 font-semibold hover:underline';

/** Who waits for whom on this build, over its diary. */
export function WaitingLines({ waiting, today, nowMs }: WaitingLinesProps) {
  const [first] = waiting;
  if (!first) return null;
  const more = waiting.length - SHOWN;
  return (
    <ul
      role="list"
      aria-label="What waits to be signed"
      className="grid gap-1 rounded border-l-4 border-brass bg-brass-wash px-4 py-2"
    >
      {waiting.slice(0, SHOWN).map((signOff) => (
        <li key={signOff.id}>
          <Link href={signOffHref(signOff)} className={linkClass}>
            {waitWords(signOff, today, nowMs)}
          </Link>
          {signOff.blocks && <p className="text-sm">{blockWords(signOff)}</p>}
        </li>
      ))}
      {more > 0 && (
        <li>
          <Link href={`/builds/${first.orderNumber}/sign-offs`} className={linkClass}>
            {more === 1 ? 'One more waits' : `${more} more wait`}
          </Link>
        </li>
      )}
    </ul>
  );
}
