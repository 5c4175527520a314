import Link from 'next/link';
import { DeclineChange, OfferChange } from './answer-change';
import type { ChangeRequestRow } from '@/db/queries/change-requests';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';
import { offerWords } from '@/lib/specs/change-words';

type ChangeListProps = {
  changes: ChangeRequestRow[];
  labels: Readonly<Record<string, string>>;
  orderNumber: string;
  /** Null for who may not answer. */
  offer: FormAction | null;
  decline: FormAction;
  dueRange: { first: string; last: string };
  zone: string;
  nowMs: number;
};

/** Every wish, newest first, with what became of it. */
export function ChangeList({ changes, labels, ...rest }: ChangeListProps) {
  return (
    <ul role="list" className="border-t-2 border-ink">
      {changes.map((change) => (
        <li key={change.id} className="grid gap-x-8 gap-y-4 border-b border-line py-5 md:grid-cols-[16rem_1fr]">
          <div>
            <h2 className="text-lg">{labels[change.itemKey] ?? change.itemKey}</h2>
            <p className="text-sm text-soft">
              asked {dayWords(change.createdAt, rest.zone, rest.nowMs)} by <bdi>{change.askedBy}</bdi>
            </p>
          </div>
          <Answer change={change} {...rest} />
        </li>
      ))}
    </ul>
  );
}

type AnswerProps = Omit<ChangeListProps, 'changes' | 'labels'> & { change: ChangeRequestRow };

function Answer({ change, orderNumber, offer, decline, dueRange, zone, nowMs }: AnswerProps) {
  const isOpen = change.state === 'asked' || change.state === 'offered';
  return (
    <div className="grid gap-4">
      <p className="reading-text">{change.wish}</p>
      <p className="font-semibold">{stateWords(change, zone, nowMs)}</p>
      {change.state === 'declined' && change.answer && <p className="max-w-[62ch] text-soft">{change.answer}</p>}
      {change.state === 'offered' && (
        <Link
          href={`/builds/${orderNumber}/sign-offs${change.signOffId ? `/${change.signOffId}` : ''}`}
          className="inline-flex min-h-11 w-fit items-center font-semibold text-finish-deep hover:underline"
        >
          {offer ? 'See the sign-off' : 'Read and sign it'}
        </Link>
      )}
      {offer && isOpen && (
        <div className="grid gap-8 xl:grid-cols-2">
          <OfferChange offer={offer} change={change} dueRange={dueRange} />
          <DeclineChange decline={decline} requestId={change.id} />
        </div>
      )}
    </div>
  );
}

function stateWords(change: ChangeRequestRow, zone: string, nowMs: number): string {
  const cost = offerWords(change.priceCents ?? 0, change.extraDays ?? 0);
  if (change.state === 'asked') return 'Waits for the shop’s answer';
  if (change.state === 'declined') return 'The shop cannot do it';
  if (change.state === 'offered') return `Offered for ${cost}; waits for the owner’s name`;
  const when = change.signedAt === null ? '' : ` ${dayWords(change.signedAt, zone, nowMs)}`;
  return `Signed${when} for ${cost}; it goes into the next version`;
}
