import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { alias, unionAll } from 'drizzle-orm/sqlite-core';
import { db } from '../client';
import { preparedByRole } from '../prepared';
import { buildIsVisible, entryIsVisible, questionIsVisible } from '../scope';
import {
  assignments,
  buildPeople,
  builds,
  entries,
  letters,
  questions,
  searchRows,
  standingAssignments,
  users,
} from '../schema';
import { isStaffRole } from '@/lib/access';
import { markedExcerpt } from '@/lib/search/excerpt';
import { matchQuery, searchWords } from '@/lib/search/match';
import type { Viewer } from '@/lib/viewer';

const PAGE = 30;
const EXCERPT_CHARS = 220;
/** Whoever reaches no more builds than these is looked for in their rows only; for others most rows are in reach. */
const FEW_BUILDS = 40;
/** Behind every row of the index. */
const AFTER_ALL = 1e15;

const author = alias(users, 'author');

const hitColumns = {
  seq: searchRows.seq,
  kind: searchRows.kind,
  subjectId: searchRows.subjectId,
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  questionId: questions.id,
  subject: questions.subject,
  author: author.name,
  at: sql<number>`coalesce(${entries.datedAt}, ${letters.writtenAt})`,
  text: sql<string>`coalesce(${entries.bodyText}, ${letters.bodyText})`,
};

/**
 * The builds with this person's name on them, or null when they are too many to name, as for whom a rule puts on builds
 * as they come. Only where to look: which of these they reach is the scope's to say.
 */
async function fewBuilds(viewer: Viewer): Promise<string[] | null> {
  const rows = await (isStaffRole(viewer.role) ? namedForStaff(viewer.id) : namedForClient(viewer.id));
  return rows.length > FEW_BUILDS || rows.some(({ id }) => id === null) ? null : rows.flatMap(({ id }) => id ?? []);
}

const namedForClient = (personId: string) =>
  db()
    .select({ id: buildPeople.buildId })
    .from(buildPeople)
    .where(eq(buildPeople.userId, personId))
    .limit(FEW_BUILDS + 1);

/** A row without a build stands for a rule. */
const namedForStaff = (personId: string) =>
  unionAll(
    db()
      .select({ id: sql<string | null>`null` })
      .from(standingAssignments)
      .where(and(eq(standingAssignments.userId, personId), isNull(standingAssignments.endedAt))),
    db()
      .select({ id: sql<string | null>`${assignments.buildId}` })
      .from(assignments)
      .where(and(eq(assignments.userId, personId), isNull(assignments.endedAt))),
  ).limit(FEW_BUILDS + 1);

const placeWord = (buildId: string) => `"${Buffer.from(buildId).toString('hex')}"`;

function inPlaces(words: string, places: string[] | null): string {
  return places === null
    ? `words : (${words})`
    : `(place : (${places.map(placeWord).join(' OR ')})) AND (words : (${words}))`;
}

/**
 * Rows of the index that match and that the viewer reads, the last written first. The index only proposes: what is read
 * is decided by the scope of each row's build, entry and question, in the same statement. Cross joins keep the order in
 * which SQLite looks, the build before the words, so that what is out of reach costs little.
 */
const hitsOf = preparedByRole((on, reader) => {
  const reads = sql`case when ${searchRows.kind} = 'entry' then ${entryIsVisible(reader)} else ${questionIsVisible(reader)} end`;
  return on
    .select(hitColumns)
    .from(sql`search_index`)
    .crossJoin(searchRows)
    .crossJoin(builds)
    .leftJoin(entries, and(eq(searchRows.kind, 'entry'), eq(entries.id, searchRows.subjectId)))
    .leftJoin(letters, and(eq(searchRows.kind, 'letter'), eq(letters.id, searchRows.subjectId)))
    .leftJoin(questions, eq(questions.id, letters.questionId))
    .leftJoin(author, sql`${author.id} = coalesce(${entries.authorId}, ${letters.authorId})`)
    .where(
      and(
        sql`search_index match ${sql.placeholder('match')}`,
        sql`search_index.rowid < ${sql.placeholder('before')}`,
        sql`${searchRows.seq} = search_index.rowid`,
        eq(builds.id, searchRows.buildId),
        buildIsVisible(reader),
        reads,
      ),
    )
    .orderBy(desc(sql`search_index.rowid`))
    .limit(PAGE + 1)
    .prepare();
});

const findHits = (viewer: Viewer, match: string, before: number | null) =>
  hitsOf(viewer.role).execute({ viewerId: viewer.id, match, before: before ?? AFTER_ALL });

type Hit = Awaited<ReturnType<typeof findHits>>[number];

function shown({ text, ...hit }: Hit, words: string[]) {
  return { ...hit, pieces: markedExcerpt(text, words, EXCERPT_CHARS) };
}

export type SearchHit = ReturnType<typeof shown>;

/**
 * Entries and letters with all of the typed words, as far as the viewer reads them, the last written on the first page, 30 a
 * page; margins are in no index. Where no whole word fits, the last may be the beginning of one.
 * @param before the `seq` after which the page above ended
 */
export async function searchAll(viewer: Viewer, typed: string, before: number | null) {
  const words = searchWords(typed);
  const whole = matchQuery(words);
  const nothing = { words, hits: [], next: null };
  if (whole === null) return nothing;
  const places = await fewBuilds(viewer);
  if (places?.length === 0) return nothing;
  const found = await findHits(viewer, inPlaces(whole, places), before);
  const begun = found.length === 0 && before === null ? matchQuery(words, 'begun') : null;
  const rows = begun === null ? found : await findHits(viewer, inPlaces(begun, places), before);
  const page = rows.slice(0, PAGE);
  const next = rows.length > PAGE ? (page.at(-1)?.seq ?? null) : null;
  const hits = page.map((hit) => shown(hit, words)).sort((one, other) => other.at - one.at || other.seq - one.seq);
  return { words, hits, next };
}
