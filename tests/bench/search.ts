import { rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { eq, inArray } from 'drizzle-orm';
import { Database, db } from '@/db/client';
import { searchAll } from '@/db/queries/search';
import { builds, entries, letters, questions, users } from '@/db/schema';
import type { Viewer } from '@/lib/viewer';
import { BUILDS, fillForSearch, vocabulary } from './fill-search';
import { seeded } from './made-history';
import { ratioAtMost, type Bench, type Row } from './row';

const NOW_MS = Date.UTC(2026, 11, 1, 9);
const SEARCHES = 400;
const WARM_UP = 40;

const viewer = (id: string, role: Viewer['role']): Viewer => ({
  id,
  role,
  name: id,
  department: 'neck',
  timeZone: 'UTC',
});

/** In turn the owner of one build, a builder of a quarter of all builds, and a lead who reaches every one. */
function searcher(turn: number): Viewer {
  if (turn % 3 === 0) return viewer(`owner-${(turn * 37) % BUILDS}`, 'buyer');
  return turn % 3 === 1 ? viewer(`staff-${1 + (turn % 11)}`, 'builder') : viewer('staff-0', 'rep');
}

/** One to three words, as likely as they are in the texts. */
function typedWords(random: () => number): string {
  const word = () => vocabulary[Math.floor(Math.exp(random() * Math.log(vocabulary.length))) - 1] ?? 'coat';
  return Array.from({ length: 1 + Math.floor(random() * 3) }, word).join(' ');
}

const shared = {
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  author: users.name,
};

/** The same rows by their primary keys: what the page would read if somebody told it which rows to show. */
async function readByKey(entryIds: string[], letterIds: string[]) {
  const [ofDiary, ofQuestions] = await Promise.all([
    db()
      .select({ id: entries.id, at: entries.datedAt, text: entries.bodyText, ...shared })
      .from(entries)
      .innerJoin(builds, eq(builds.id, entries.buildId))
      .innerJoin(users, eq(users.id, entries.authorId))
      .where(inArray(entries.id, entryIds)),
    db()
      .select({ id: letters.id, at: letters.writtenAt, text: letters.bodyText, subject: questions.subject, ...shared })
      .from(letters)
      .innerJoin(questions, eq(questions.id, letters.questionId))
      .innerJoin(builds, eq(builds.id, questions.buildId))
      .innerJoin(users, eq(users.id, letters.authorId))
      .where(inArray(letters.id, letterIds)),
  ]);
  return ofDiary.length + ofQuestions.length;
}

const TRIES = 3;

/**
 * Milliseconds on the processor, the best of three tries. SQLite works inside this process, so that is what a search
 * waits for; a clock on the wall would also measure who else shares the machine.
 */
async function timed(work: () => Promise<unknown>): Promise<number> {
  let bestMs = Infinity;
  for (let n = 0; n < TRIES; n++) {
    const start = process.cpuUsage();
    await work();
    const { user, system } = process.cpuUsage(start);
    bestMs = Math.min(bestMs, (user + system) / 1000);
  }
  return bestMs;
}

/** The value that 95 of 100 stay at or below. */
function p95(times: number[]): number {
  const sorted = [...times].sort((one, other) => one - other);
  return sorted[Math.ceil(sorted.length * 0.95) - 1] ?? NaN;
}

/** Searches and key reads take turns, so that whatever else the machine does meets both. */
async function measure(): Promise<{ value: number; floor: number }> {
  const random = seeded(17);
  const searches: number[] = [];
  const reads: number[] = [];
  let found = 0;
  for (let turn = 0; turn < SEARCHES + WARM_UP; turn++) {
    const [who, typed] = [searcher(turn), typedWords(random)];
    const idsOf = async (kind: 'entry' | 'letter') =>
      (await searchAll(who, typed, null)).hits.filter((hit) => hit.kind === kind).map(({ subjectId }) => subjectId);
    const [entryIds, letterIds] = [await idsOf('entry'), await idsOf('letter')];
    if (entryIds.length + letterIds.length === 0) continue;
    const searchMs = await timed(() => searchAll(who, typed, null));
    const readMs = await timed(() => readByKey(entryIds, letterIds));
    if (turn < WARM_UP) continue;
    found += entryIds.length + letterIds.length;
    searches.push(searchMs);
    reads.push(readMs);
  }
  if (searches.length < SEARCHES / 2) throw new Error(`only ${searches.length} searches found anything`);
  console.log(`${searches.length} searches, ${(found / searches.length).toFixed(1)} rows each on the mean`);
  return { value: p95(searches), floor: p95(reads) };
}

async function run(): Promise<Row[]> {
  const file = join(tmpdir(), `flitchbook-search-${process.pid}.db`);
  const before = globalThis.flitchbookDatabase;
  try {
    await fillForSearch(file, NOW_MS);
    globalThis.flitchbookDatabase = new Database(`file:${file}`);
    return [ratioAtMost(3, { name: 'search', ...(await measure()), unit: 'CPU ms p95' })];
  } finally {
    globalThis.flitchbookDatabase?.close();
    globalThis.flitchbookDatabase = before;
    for (const part of ['', '-wal', '-shm']) rmSync(file + part, { force: true });
  }
}

export const search: Bench = { name: 'search', run };
