import { clsx } from 'clsx';
import Link from 'next/link';
import type { ReactNode } from 'react';
import { DrawingLink } from './drawing-link';
import type { SpecLine } from './spec-line';
import { UnitWords } from './unit-words';

type SpecRowProps = { line: SpecLine; signedTitle: string; orderNumber: string; askHref: string | null };

/** One item: a row on a wide screen, a card on a phone. */
export function SpecRow({ line, signedTitle, orderNumber, askHref }: SpecRowProps) {
  return (
    <tr
      id={`item-${line.key}`}
      role="row"
      className="grid scroll-mt-4 grid-cols-2 gap-x-4 gap-y-3 border-b border-line py-4 md:table-row md:py-0"
    >
      <th role="rowheader" scope="row" className="col-span-2 align-top font-normal md:py-3.5 md:pr-3">
        <span className="font-semibold break-words md:font-normal">{line.label}</span>
        <ChangeNote line={line} askHref={askHref} />
      </th>
      <Cell title={signedTitle} note={line.allowed !== line.within && line.allowed}>
        <span className="font-semibold">
          <UnitWords words={line.signed} />
        </span>
        {line.drawing && (
          <span className="block">
            <DrawingLink drawing={line.drawing} />
          </span>
        )}
      </Cell>
      <Cell title="As built" note={line.within} isLate={line.state === 'out_of_tolerance'}>
        <Built line={line} />
      </Cell>
      <Cell title="Proof" className="col-span-2 grid grid-cols-[6rem_1fr] items-baseline md:table-cell">
        <Proof line={line} orderNumber={orderNumber} />
      </Cell>
    </tr>
  );
}

type CellProps = { title: string; note?: ReactNode; isLate?: boolean; className?: string; children: ReactNode };

function Cell({ title, note, isLate = false, className, children }: CellProps) {
  return (
    <td role="cell" className={clsx('min-w-0 align-top break-words md:px-3 md:py-3.5', className)}>
      <span aria-hidden="true" className="block text-xs text-soft md:hidden">
        {title}
      </span>
      {children}
      {note && <span className={clsx('block text-sm', isLate ? 'text-late' : 'text-soft')}>{note}</span>}
    </td>
  );
}

function ChangeNote({ line, askHref }: { line: SpecLine; askHref: string | null }) {
  const { state, words } = line.canChange;
  if (state === 'frozen' && !askHref) return null;
  if (state === 'frozen')
    return (
      <Link
        href={`${askHref}?item=${line.key}`}
        aria-label={`Ask for a change of ${line.label}, ${words}`}
        className="block w-fit py-1 text-sm text-soft underline decoration-line underline-offset-2 hover:text-finish-deep"
      >
        {words}
      </Link>
    );
  return <span className={clsx('block text-sm', state === 'opened' ? 'text-brass-deep' : 'text-soft')}>{words}</span>;
}

function Built({ line: { state, measured } }: { line: SpecLine }) {
  if (measured)
    return (
      <span className={clsx('font-semibold', state === 'out_of_tolerance' && 'text-late')}>
        <UnitWords words={measured} />
        {state === 'out_of_tolerance' && <span className="sr-only"> out of tolerance</span>}
      </span>
    );
  if (state === 'proven') return <span className="font-semibold">as signed</span>;
  return <span className="text-soft">{state === 'conceded' ? 'let pass' : 'not yet'}</span>;
}

const linkClass = 'inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline md:min-h-0';

function Proof({ line, orderNumber }: { line: SpecLine; orderNumber: string }) {
  const [latest, ...others] = line.proofs;
  return (
    <div className="min-w-0">
      {latest && (
        <Link href={latest.href} className={linkClass}>
          {latest.words}
        </Link>
      )}
      {others.length > 0 && <span className="block text-sm text-soft">and {others.length} more</span>}
      {line.concededBy && <span className="block text-sm text-brass-deep">{line.concededBy}</span>}
      {line.waitsFor && (
        <Link href={`/builds/${orderNumber}/sign-offs`} className="block font-semibold text-brass-deep hover:underline">
          waits for the signature under “{line.waitsFor}”
        </Link>
      )}
      {!latest && !line.waitsFor && <span className="text-soft">{line.expectedAt ?? 'no stage named'}</span>}
    </div>
  );
}
