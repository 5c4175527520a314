'use client';

import Link from 'next/link';
import { Button } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/checkbox';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { FloorRoute, NamedStage } from '@/lib/floor/row';
import { plainWish, sortings, wishQuery, type FloorChoices, type FloorWish } from '@/lib/floor/wish';

type FloorFiltersProps = {
  wish: FloorWish;
  onWish: (wish: FloorWish) => void;
  choices: FloorChoices;
  routes: readonly FloorRoute[];
  departments: readonly NamedStage[];
};

const options = (values: string[]) => values.map((value) => ({ value, label: value }));
const named = (rows: readonly NamedStage[]) => rows.map(({ key, name }) => ({ value: key, label: name }));
const sortOptions = Object.entries(sortings).map(([value, label]) => ({ value, label }));

/** What of the floor is shown and in which order. Without a script it is a form that loads the page anew. */
export function FloorFilters({ wish, onWish, choices, routes, departments }: FloorFiltersProps) {
  const isNarrowed = wishQuery({ ...wish, sort: plainWish.sort }) !== '';
  const select = (name: 'sort' | 'department' | 'rep' | 'route' | 'rack') => ({
    name,
    value: wish[name],
    onChange: ({ target }: { target: { value: string } }) => onWish({ ...wish, [name]: target.value }),
  });
  const tick = (name: 'late' | 'quiet' | 'mine') => ({
    name,
    value: '1',
    checked: wish[name],
    onChange: ({ target }: { target: { checked: boolean } }) => onWish({ ...wish, [name]: target.checked }),
  });
  return (
    <form method="get" action="/floor" className="grid gap-x-4" onSubmit={(event) => event.preventDefault()}>
      <details className="group/filters" open={isNarrowed || undefined}>
        <summary className="inline-flex min-h-11 items-center font-semibold text-finish-deep">
          Find, sort and choose
        </summary>
        <div className="grid items-end gap-x-4 gap-y-3 pt-1 pb-2 sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-6">
          <TextInput
            label="Find"
            name="find"
            type="search"
            value={wish.find}
            onChange={({ target }) => onWish({ ...wish, find: target.value })}
          />
          <Select label="Sort by" options={sortOptions} {...select('sort')} />
          <Select
            label="Department"
            prompt="All"
            options={named(departments.filter(({ key }) => choices.departments.includes(key)))}
            {...select('department')}
          />
          <Select label="Rep" prompt="All" options={options(choices.reps)} {...select('rep')} />
          <Select
            label="Route"
            prompt="All"
            options={routes.map(({ id, name }) => ({ value: id, label: name }))}
            {...select('route')}
          />
          <Select label="Rack" prompt="All" options={options(choices.racks)} {...select('rack')} />
        </div>
        <noscript>
          <Button type="submit">Show</Button>
        </noscript>
      </details>
      <div className="flex flex-wrap items-center gap-x-6">
        <Checkbox label="Quiet" {...tick('quiet')} />
        <Checkbox label="Late" {...tick('late')} />
        <Checkbox label="Yours" {...tick('mine')} />
        {isNarrowed && (
          <button
            type="button"
            className="min-h-11 font-semibold text-finish-deep hover:underline"
            onClick={() => onWish({ ...plainWish, sort: wish.sort })}
          >
            Show all
          </button>
        )}
        {wish.rack !== '' && (
          <Link
            href={`/floor/racks/${encodeURIComponent(wish.rack)}`}
            className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
          >
            Print the list of {wish.rack}
          </Link>
        )}
      </div>
    </form>
  );
}
