import { clsx } from 'clsx';
import Link from 'next/link';
import { signOffHref, type SignOffReader } from './sign-off-list';
import { StateMark } from './state-mark';
import { SectionHeading } from '@/components/ui/section-heading';
import type { SignOffRow } from '@/db/queries/sign-offs';
import { dayWords } from '@/lib/date-words';

type SignOffChainProps = { chain: SignOffRow[]; currentId: string; reader: SignOffReader };

/** What was asked of the same thing before and after, so that nothing is replaced unseen. */
export function SignOffChain({ chain, currentId, reader }: SignOffChainProps) {
  if (chain.length < 2) return null;
  return (
    <section aria-labelledby="chain" className="grid gap-3">
      <SectionHeading id="chain">What was asked before and after</SectionHeading>
      <ol role="list" className="grid gap-1">
        {chain.map((signOff) => {
          const isHere = signOff.id === currentId;
          return (
            <li
              key={signOff.id}
              aria-current={isHere ? 'true' : undefined}
              className={clsx('border-l-4 py-1.5 pl-4', isHere ? 'border-finish' : 'border-line')}
            >
              {isHere ? (
                <bdi className="font-semibold">{signOff.title}</bdi>
              ) : (
                <Link
                  href={signOffHref(signOff)}
                  className="-my-2.5 inline-block py-2.5 font-semibold text-finish-deep hover:underline"
                >
                  <bdi>{signOff.title}</bdi>
                </Link>
              )}
              <p className="text-sm text-soft">
                sent {dayWords(signOff.askedAt, reader.zone, reader.nowMs)} ·{' '}
                <StateMark signOff={signOff} today={reader.today} />
              </p>
            </li>
          );
        })}
      </ol>
    </section>
  );
}
