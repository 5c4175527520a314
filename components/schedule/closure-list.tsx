import { ButtonForm } from '@/components/people/button-form';
import { EmptyState } from '@/components/ui/empty-state';
import type { FormAction } from '@/lib/action';
import { dateWords } from '@/lib/schedule/window-words';

type Closure = {
  id: string;
  startsOn: string;
  endsOn: string;
  name: string;
  closesAtMin: number | null;
  isHoliday: boolean;
};

function whenWords({ startsOn, endsOn, closesAtMin }: Closure, today: string): string {
  const days =
    startsOn === endsOn ? dateWords(startsOn, today) : `${dateWords(startsOn, today)} to ${dateWords(endsOn, today)}`;
  if (closesAtMin === null) return days;
  const minutes = String(closesAtMin % 60).padStart(2, '0');
  return `${days}, work ends at ${Math.floor(closesAtMin / 60)}:${minutes}`;
}

/** Every day off ahead, each with a button that opens the shop again. */
export function ClosureList({
  closures,
  open,
  today,
}: {
  closures: readonly Closure[];
  open: FormAction;
  today: string;
}) {
  if (closures.length === 0)
    return <EmptyState title="No days off ahead">Add a shutdown, or take the holidays of your country.</EmptyState>;
  return (
    <ul role="list" className="border-t border-line">
      {closures.map((closure) => (
        <li
          key={closure.id}
          className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 border-b border-line py-2"
        >
          <span>
            <span className="font-semibold">{closure.name}</span>
            <span className="block text-sm text-soft">
              {whenWords(closure, today)}
              {closure.isHoliday && ' · public holiday'}
            </span>
          </span>
          <ButtonForm
            send={open}
            values={{ closureId: closure.id }}
            name={`Work on ${closure.name}, ${closure.startsOn}`}
          >
            Work that day
          </ButtonForm>
        </li>
      ))}
    </ul>
  );
}
