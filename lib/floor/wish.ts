import type { FloorRow } from './row';

export const sortings = {
  order: 'order number',
  stage: 'furthest along',
  days: 'longest over its usual time',
  silence: 'longest silence',
  ready: 'ready soonest',
} as const;
export type Sorting = keyof typeof sortings;

/** What somebody wants to see of the floor, as its address keeps it. */
export type FloorWish = {
  sort: Sorting;
  department: string;
  rep: string;
  route: string;
  rack: string;
  find: string;
  late: boolean;
  quiet: boolean;
  mine: boolean;
};

export const plainWish: FloorWish = {
  sort: 'order',
  department: '',
  rep: '',
  route: '',
  rack: '',
  find: '',
  late: false,
  quiet: false,
  mine: false,
};

const LONGEST = 80;
const isSorting = (value: string): value is Sorting => Object.hasOwn(sortings, value);

/** Reads an address; what it does not know is left out. */
export function parseWish(of: (name: string) => string | null | undefined): FloorWish {
  const text = (name: string) => (of(name) ?? '').slice(0, LONGEST);
  const sort = text('sort');
  return {
    sort: isSorting(sort) ? sort : plainWish.sort,
    department: text('department'),
    rep: text('rep'),
    route: text('route'),
    rack: text('rack'),
    find: text('find'),
    late: text('late') === '1',
    quiet: text('quiet') === '1',
    mine: text('mine') === '1',
  };
}

/** The address of a wish: only what differs from the plain floor. */
export function wishQuery(wish: FloorWish): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(wish)) {
    if (value === true) query.set(name, '1');
    else if (typeof value === 'string' && value !== '' && value !== plainWish.sort) query.set(name, value);
  }
  return query.toString();
}

const overUsual = ({ days, usual }: FloorRow) => (days === null || usual === null ? -Infinity : days - usual[1]);

const orders: Record<Sorting, (one: FloorRow, other: FloorRow) => number> = {
  order: () => 0,
  stage: (one, other) => other.at + other.share - (one.at + one.share),
  days: (one, other) => compare(overUsual(other), overUsual(one)),
  silence: (one, other) => other.silentDays - one.silentDays,
  ready: (one, other) => compare(one.readyBy ?? '9999', other.readyBy ?? '9999'),
};

function compare<T extends string | number>(one: T, other: T): number {
  if (one === other) return 0;
  return one < other ? -1 : 1;
}

function fits(row: FloorRow, wish: FloorWish, find: string): boolean {
  if (wish.department !== '' && row.department !== wish.department) return false;
  if (wish.rep !== '' && row.repName !== wish.rep) return false;
  if (wish.route !== '' && row.routeId !== wish.route) return false;
  if (wish.rack !== '' && row.rack !== wish.rack) return false;
  if ((wish.late && !row.isLate) || (wish.quiet && row.quiet === 0) || (wish.mine && !row.isMine)) return false;
  return find === '' || `${row.orderNumber} ${row.instrument} ${row.ownerName ?? ''}`.toLowerCase().includes(find);
}

/** The rows somebody wants, in the order they want; equal ones stay in the order of their numbers. */
export function arrange(rows: readonly FloorRow[], wish: FloorWish): FloorRow[] {
  const find = wish.find.trim().toLowerCase();
  return rows.filter((row) => fits(row, wish, find)).sort(orders[wish.sort]);
}

/** What the rows can be narrowed to, each once and in order. */
export function choicesOf(rows: readonly FloorRow[]) {
  const distinct = (values: (string | null)[]) =>
    [...new Set(values)]
      .filter((value) => value !== null)
      .sort((one, other) => one.localeCompare(other, 'en', { numeric: true }));
  return {
    departments: distinct(rows.map(({ department }) => department)),
    reps: distinct(rows.map(({ repName }) => repName)),
    racks: distinct(rows.map(({ rack }) => rack)),
  };
}

export type FloorChoices = ReturnType<typeof choicesOf>;
