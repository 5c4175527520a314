import { TellForm } from './tell-form';
import { Notice } from '@/components/ui/notice';
import type { CheckRunRow } from '@/db/queries/checks';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';

type UndecidedProps = {
  runs: CheckRunRow[];
  zone: string;
  nowMs: number;
  tell: FormAction;
  keep: FormAction;
};

/** Failed inspections of a build: the rep tells the player, or keeps it in the shop. */
export function UndecidedChecks({ runs, zone, nowMs, tell, keep }: UndecidedProps) {
  return runs.map((run) => (
    <Notice
      key={run.id}
      tone="brass"
      title={`${run.listName} failed${run.finishedAt === null ? '' : ` on ${dayWords(run.finishedAt, zone, nowMs)}`}`}
    >
      <p>
        It went back to {run.backToStageName}: {run.reason} What is the player told?
      </p>
      <TellForm tell={tell} keep={keep} orderNumber={run.orderNumber} runId={run.id} />
    </Notice>
  ));
}

/** The same for all builds of a rep, in short: where to go and decide. */
export function UndecidedList({ runs, zone, nowMs }: Pick<UndecidedProps, 'runs' | 'zone' | 'nowMs'>) {
  if (runs.length === 0) return null;
  return (
    <Notice tone="brass" title="Decide what the player is told">
      <ul role="list" className="grid gap-1">
        {runs.map((run) => (
          <li key={run.id}>
            <a
              href={`/builds/${run.orderNumber}`}
              className="inline-flex min-h-6 items-center font-semibold text-finish-deep hover:underline"
            >
              {run.orderNumber}
            </a>{' '}
            {run.listName} failed{run.finishedAt !== null && ` on ${dayWords(run.finishedAt, zone, nowMs)}`}:{' '}
            {run.reason}
          </li>
        ))}
      </ul>
    </Notice>
  );
}
