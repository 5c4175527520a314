import { ButtonForm } from '@/components/people/button-form';
import { EmptyState } from '@/components/ui/empty-state';
import { SectionHeading } from '@/components/ui/section-heading';
import type { TroubledReader } from '@/db/queries/mail-watch';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';

const why = {
  bounced: 'Mail comes back from their address.',
  complained: 'Our mail was called unwanted there.',
};

type TroubledReadersProps = {
  unreachable: TroubledReader[];
  astray: TroubledReader[];
  reachAgain: FormAction;
  zone: string;
  nowMs: number;
};

/** People whom mail does not reach, and people whose time zone is gone. */
export function TroubledReaders({ unreachable, astray, reachAgain, zone, nowMs }: TroubledReadersProps) {
  if (unreachable.length + astray.length === 0)
    return <EmptyState title="Everybody is reached">No address bounces, and every time zone is known.</EmptyState>;
  return (
    <div className="grid gap-8">
      <ul role="list" className="border-t-2 border-ink">
        {unreachable.map((person) => (
          <li key={person.id} className="flex flex-wrap items-center gap-x-8 gap-y-2 border-b border-line py-3">
            <div className="min-w-0 flex-1 basis-60">
              <bdi className="font-semibold">{person.name}</bdi>
              <p className="text-sm text-soft">
                {person.why && why[person.why]}{' '}
                {person.since && `Since ${dayWords(person.since, zone, nowMs)} none goes out.`}
              </p>
            </div>
            <ButtonForm send={reachAgain} values={{ userId: person.id }} name={`Write to ${person.name} again`}>
              Write to them again
            </ButtonForm>
          </li>
        ))}
      </ul>
      {astray.length > 0 && <Astray people={astray} />}
    </div>
  );
}

function Astray({ people }: { people: TroubledReader[] }) {
  return (
    <section aria-label="Time zones that are gone" className="grid gap-3">
      <SectionHeading>Time zones that are gone</SectionHeading>
      <p className="max-w-2xl text-soft">
        No clock here knows these any more. Their readers’ digests come by UTC, and say so, until they choose again.
      </p>
      <ul role="list" className="border-t border-line">
        {people.map(({ id, name, zone }) => (
          <li key={id} className="flex flex-wrap gap-x-4 border-b border-line py-2">
            <bdi className="font-semibold">{name}</bdi>
            <span className="break-all text-soft">{zone}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
