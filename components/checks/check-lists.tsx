import Link from 'next/link';
import { ButtonForm } from '@/components/people/button-form';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import type { BuildChecks, CheckRunRow } from '@/db/queries/checks';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';

type When = { zone: string; nowMs: number };
type ListsProps = { checks: BuildChecks; orderNumber: string; start: FormAction };

/** The inspection lists of a build's route, each with where it stands and how to go on. */
export function CheckLists({ checks, orderNumber, start }: ListsProps) {
  const { lists, runs } = checks;
  if (lists.length === 0)
    return (
      <EmptyState title="This route has no inspection lists">
        An admin writes them under access, by route and stage.
      </EmptyState>
    );
  return (
    <ul role="list" className="grid gap-6">
      {lists.map((list) => {
        const open = runs.find(({ listId, outcome }) => listId === list.id && outcome === null);
        const isNow = list.startedAt !== null && list.finishedAt === null;
        return (
          <li key={list.id} className="grid gap-2 border-t border-line pt-4">
            <h3 className="text-lg">{list.name}</h3>
            <p className="text-soft">
              In {list.stageName}. {standing(list.isPassed, open !== undefined, isNow, list.startedAt)}
            </p>
            {open && (
              <div>
                <LinkButton size="bench" href={`/builds/${orderNumber}/checks/${open.id}`}>
                  Go on with it
                </LinkButton>
              </div>
            )}
            {!open && isNow && (
              <ButtonForm
                send={start}
                values={{ orderNumber, listId: list.id }}
                variant={list.isPassed ? 'quiet' : 'primary'}
                name={`Go through ${list.name}`}
              >
                {list.isPassed ? 'Go through it again' : 'Go through it'}
              </ButtonForm>
            )}
          </li>
        );
      })}
    </ul>
  );
}

function standing(isPassed: boolean, isOpen: boolean, isNow: boolean, startedAt: number | null): string {
  if (isOpen) return 'Under way.';
  if (isPassed) return 'Passed.';
  if (isNow) return 'Not passed yet: the next stage waits for it.';
  return startedAt === null ? 'The build has not come there yet.' : 'It was not gone through.';
}

const tellings = {
  undecided: 'What the player is told is not decided yet.',
  told: 'The player has been told.',
  kept: 'Kept in the shop.',
};

type RunsProps = When & { runs: CheckRunRow[]; orderNumber: string };

/** Every walk that was finished, newest first. */
export function FinishedRuns({ runs, orderNumber, zone, nowMs }: RunsProps) {
  return (
    <ul role="list" className="grid gap-4">
      {runs.map((run) => (
        <li key={run.id} className="border-t border-line pt-3">
          <p>
            <Link
              href={`/builds/${orderNumber}/checks/${run.id}`}
              className="font-semibold text-finish-deep hover:underline"
            >
              {run.listName}, {run.finishedAt !== null && dayWords(run.finishedAt, zone, nowMs)}
            </Link>
            : {run.outcome === 'failed' ? 'failed' : 'passed'}, <bdi>{run.finishedBy}</bdi>
          </p>
          {run.outcome === 'failed' && (
            <p className="text-soft">
              Back to {run.backToStageName}: {run.reason} {run.telling && tellings[run.telling]}
            </p>
          )}
        </li>
      ))}
    </ul>
  );
}
