import Link from 'next/link';
import type { SignOffReader } from './sign-off-list';
import { StateMark } from './state-mark';
import type { SignOffPage } from '@/db/queries/sign-offs';
import { calendarDayWords } from '@/lib/sign-offs/state-words';

/** What is to be signed, by when, and what waits for it. */
export function SignOffHeader({ signOff, reader }: { signOff: SignOffPage; reader: SignOffReader }) {
  const { orderNumber, title, message, dueOn, blocks, state, ownerName, askedBy } = signOff;
  const isOpen = state === 'asked' || state === 'change_asked';
  return (
    <header className="grid gap-3">
      <p className="narrow text-sm font-semibold text-soft">
        <Link href={`/builds/${orderNumber}/sign-offs`} className="inline-flex min-h-6 items-center hover:underline">
          Sign-offs of {orderNumber}
        </Link>
      </p>
      <h1 className="text-3xl break-words md:text-4xl">
        <bdi>{title}</bdi>
      </h1>
      <p className="text-lg">
        <StateMark signOff={signOff} today={reader.today} />
        {isOpen && <span className="text-soft"> · by {calendarDayWords(dueOn, reader.nowMs)}</span>}
        {ownerName && (
          <span className="text-soft">
            {' '}
            · for <bdi>{ownerName}</bdi>
          </span>
        )}
      </p>
      {isOpen && blocks && <p className="font-semibold text-brass-deep">{blocks} starts when it is signed.</p>}
      {message !== '' && (
        <blockquote className="max-w-[62ch] border-l-4 border-line pl-4 font-read text-lg break-words whitespace-pre-line">
          {message}
          <footer className="mt-1 font-sans text-sm text-soft">
            <bdi>{askedBy}</bdi>
          </footer>
        </blockquote>
      )}
    </header>
  );
}
