import type { ReactNode } from 'react';
import { DocumentSubject } from './document-subject';
import { SpecSubject } from './spec-subject';
import type { SubjectOfSignOff } from '@/db/queries/sign-off-subjects';
import type { Drawing } from '@/lib/specs/drawings';
import type { MaterialNames } from '@/lib/specs/item-words';

type SubjectProps = {
  subject: SubjectOfSignOff;
  title: string;
  materials: MaterialNames;
  drawings: readonly Drawing[];
  itemLabel: string | null;
};

/** Exactly what is signed, whatever it is. */
export function Subject({
  subject: { version, document, change, concession },
  title,
  materials,
  drawings,
  itemLabel,
}: SubjectProps) {
  if (version)
    return (
      <SpecSubject document={version.document} number={version.number} materials={materials} drawings={drawings} />
    );
  if (document) return <DocumentSubject document={document} title={title} />;
  if (change)
    return (
      <Facts
        rows={[
          ['What is changed', itemLabel ?? change.itemKey],
          [
            'Your wish',
            <span key="wish" className="font-read break-words">
              {change.wish}
            </span>,
          ],
          ['Price', change.priceCents === null ? 'none' : moneyWords(change.priceCents)],
          ['More time', daysWords(change.extraDays ?? 0)],
        ]}
      />
    );
  if (concession)
    return (
      <>
        <p className="max-w-2xl">
          The instrument came out a little different from what was signed here. It stays as it is only if you agree.
        </p>
        <Facts
          rows={[
            ['Item', itemLabel ?? 'An item of the spec'],
            ['As signed', concession.signed],
            ['As built', concession.measured],
            [
              'Why',
              <span key="why" className="font-read break-words">
                {concession.reason}
              </span>,
            ],
          ]}
        />
      </>
    );
  return <p className="text-soft">What was to be signed is no longer there. Ask your rep about it.</p>;
}

const moneyWords = (cents: number) =>
  new Intl.NumberFormat('en-US', { style: 'currency', currency: 'USD' }).format(cents / 100);

const daysWords = (days: number) => (days === 0 ? 'none' : days === 1 ? 'about one day' : `about ${days} days`);

function Facts({ rows }: { rows: [name: string, value: ReactNode][] }) {
  return (
    <dl className="grid max-w-2xl border-t-2 border-ink">
      {rows.map(([name, value]) => (
        <div key={name} className="grid gap-x-6 border-b border-line py-3 sm:grid-cols-[11rem_minmax(0,1fr)]">
          <dt className="text-soft">{name}</dt>
          <dd className="font-semibold break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
