import type { SpecLine } from './spec-line';
import type { VersionRow } from '@/db/queries/spec-versions';
import { dayWords } from '@/lib/date-words';

/** "Order Q-2417 · version 4, signed 2 June" */
export function specOver(
  orderNumber: string,
  versions: VersionRow[],
  shown: number | null,
  zone: string,
  nowMs: number,
): string {
  const version = versions.find(({ number }) => number === shown);
  if (!version) return `Order ${orderNumber}`;
  const day = (ms: number) => dayWords(ms, zone, nowMs);
  const how =
    version.state === 'signed' && version.answeredAt !== null
      ? `signed ${day(version.answeredAt)}`
      : `sent ${day(version.sentAt)}, not signed yet`;
  return `Order ${orderNumber} · version ${version.number}, ${how}`;
}

/** The figures beside the title; nothing is proven before it is signed. */
export function specCounts(lines: SpecLine[], isSigned: boolean) {
  const count = (fits: (line: SpecLine) => boolean) => lines.filter(fits).length;
  const canStillChange = { value: `${count((line) => line.canChange.state !== 'frozen')}`, label: 'can still change' };
  if (!isSigned) return [{ value: `${lines.length}`, label: 'items' }, canStillChange];
  const out = count(({ state }) => state === 'out_of_tolerance');
  const conceded = count(({ state }) => state === 'conceded');
  return [
    { value: `${count(({ state }) => state === 'proven')} of ${lines.length}`, label: 'proven' },
    { value: `${out}`, label: 'out of tolerance', isLate: out > 0 },
    ...(conceded > 0 ? [{ value: `${conceded}`, label: 'let pass' }] : []),
    canStillChange,
  ];
}
