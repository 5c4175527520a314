import { describe, expect, test } from 'vitest';
import type { FloorRow } from '@/lib/floor/row';
import { arrange, choicesOf, parseWish, plainWish, wishQuery, type FloorWish } from '@/lib/floor/wish';

const row = (over: Partial<FloorRow>): FloorRow => ({
  orderNumber: 'Q-1',
  instrument: 'Nightjar',
  finishHex: '#007a84',
  ownerName: null,
  repName: null,
  routeId: 'solid',
  rack: null,
  isHeld: false,
  at: 0,
  share: 0,
  department: 'neck',
  days: 1,
  usual: [2, 4],
  isLate: false,
  silentDays: 0,
  quiet: 0,
  ready: '',
  readyBy: null,
  waits: [],
  isStopped: false,
  isMine: false,
  ...over,
});

const rows = [
  row({ orderNumber: 'Q-1', ownerName: 'Ida Brandt', department: 'wood', rack: 'rack 2', readyBy: '2027-01-09' }),
  row({ orderNumber: 'Q-2', quiet: 1, silentDays: 20, repName: 'Ruth', rack: 'rack 10', days: 9, isLate: true, at: 3 }),
  row({ orderNumber: 'Q-3', isMine: true, routeId: 'bass', days: null, usual: null, readyBy: '2026-12-09', at: 5 }),
];
const shown = (wish: Partial<FloorWish>) =>
  arrange(rows, { ...plainWish, ...wish }).map(({ orderNumber }) => orderNumber);

describe('the floor as somebody wants it', () => {
  test.each([
    [{}, ['Q-1', 'Q-2', 'Q-3']],
    [{ department: 'wood' }, ['Q-1']],
    [{ rep: 'Ruth' }, ['Q-2']],
    [{ route: 'bass' }, ['Q-3']],
    [{ rack: 'rack 10' }, ['Q-2']],
    [{ late: true }, ['Q-2']],
    [{ quiet: true }, ['Q-2']],
    [{ mine: true }, ['Q-3']],
    [{ find: ' IDA ' }, ['Q-1']],
    [{ find: 'q-3' }, ['Q-3']],
    [{ quiet: true, mine: true }, []],
    [{ sort: 'silence' }, ['Q-2', 'Q-1', 'Q-3']],
    [{ sort: 'ready' }, ['Q-3', 'Q-1', 'Q-2']],
    [{ sort: 'days' }, ['Q-2', 'Q-1', 'Q-3']],
    [{ sort: 'stage' }, ['Q-3', 'Q-2', 'Q-1']],
  ] as [Partial<FloorWish>, string[]][])('%j shows %j', (wish, expected) => {
    expect(shown(wish)).toEqual(expected);
  });

  test('racks are offered in the order in which people count', () => {
    expect(choicesOf(rows).racks).toEqual(['rack 2', 'rack 10']);
  });
});

describe('its address', () => {
  const wish: FloorWish = { ...plainWish, sort: 'ready', rack: 'rack 7', find: 'heron & co', quiet: true };

  test('brings every wish back', () => {
    const query = new URLSearchParams(wishQuery(wish));
    expect(parseWish((name) => query.get(name))).toEqual(wish);
  });

  test('is empty for the plain floor', () => {
    expect(wishQuery(plainWish)).toBe('');
  });

  test('leaves out what it does not know, and cuts what is too long', () => {
    const typed: Record<string, string> = { sort: 'constructor', quiet: 'yes', find: 'x'.repeat(5000) };
    const read = parseWish((name) => typed[name]);
    expect([read.sort, read.quiet, read.find.length]).toEqual(['order', false, 80]);
  });
});
