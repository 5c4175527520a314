import { and, eq, sql, type SQL } from 'drizzle-orm';
import { preparedByRole } from '../prepared';
import { buildIsVisible, entryIsVisible } from '../scope';
import { builds, buildStages, entries, photos, proofs, readings, users } from '../schema';
import { isStaffRole, type Role } from '@/lib/access';
import { OutOfReach } from '@/lib/errors';
import type { ShownReading } from '@/lib/readings/reading';
import { RecentTexts } from '@/lib/recent-texts';
import type { Viewer } from '@/lib/viewer';

const PAGE = 12;

export type DiaryPhoto = { id: string; widthPx: number; heightPx: number; blur: string; alt: string; widthsPx: string };

/** One entry as its reader gets it. `body` is an unchecked document: the renderer takes anything. */
export type DiaryEntry = {
  id: string;
  stage: string;
  author: string;
  department: string | null;
  datedAt: number;
  edited: number;
  body: unknown;
  photos: DiaryPhoto[];
  /** As they were when they were taken; null for one that is damaged. */
  readings: (ShownReading | null)[];
  /** The spec items it shows, by name. */
  shows: string[];
  /** Staff only: who reads it, whether it waits for release, and whose it is. */
  audience?: 'buyer' | 'shop';
  state?: 'held' | 'published';
  authorId?: string;
};

export type DiaryPage = { entries: DiaryEntry[]; next: string | null };

export type DiaryCursor = { datedAt: number; id: string };

/** @returns null for anything that is not a cursor this product wrote */
export function parseCursor(text: string | null): DiaryCursor | null {
  const match = /^(\d{1,15})\.([\w-]{1,40})$/.exec(text ?? '');
  return match ? { datedAt: Number(match[1]), id: match[2] ?? '' } : null;
}

/**
 * A diary's state for this viewer, cheap enough to ask every few seconds. It changes with everything that the viewer's
 * page would show differently.
 * @throws OutOfReach
 */
export async function diaryState(viewer: Viewer, orderNumber: string): Promise<{ buildId: string; etag: string }> {
  const state = await stateOf(viewer.role).get({ viewerId: viewer.id, orderNumber });
  if (!state) throw new OutOfReach(orderNumber);
  return state;
}

/**
 * A diary's state and, unless the reader holds that state already, its page as JSON text. Whether the reader may see it
 * is asked of the database every time; only the making of the page is saved.
 * @param known the reader's state; `page` is null while the diary is still in it
 * @throws OutOfReach
 */
export async function diaryAnswer(
  viewer: Viewer,
  orderNumber: string,
  before: DiaryCursor | null,
  known: string | null,
): Promise<{ etag: string; page: string | null }> {
  const { buildId, etag } = await diaryState(viewer, orderNumber);
  if (etag === known) return { etag, page: null };
  const place = before ? `${before.datedAt}.${before.id}` : '';
  const page = recentPages.get(`${buildId} ${etag} ${place}`);
  if (page !== undefined) return { etag, page };
  const made = await makePage(viewer, buildId, before);
  if (!made) throw new OutOfReach(orderNumber);
  recentPages.set(`${buildId} ${made.etag} ${place}`, made.page);
  return made;
}

/** One page of a build's diary, newest first; without entries when the build is out of reach. */
export async function diaryPage(viewer: Viewer, buildId: string, before: DiaryCursor | null): Promise<DiaryPage> {
  const made = await makePage(viewer, buildId, before);
  const page: DiaryPage = made ? JSON.parse(made.page) : { entries: [], next: null };
  return page;
}

/** Pages by build, state and place. The state tells the shop's side from the client's, so neither gets the other's. */
const recentPages = new RecentTexts(64_000_000);

/** The page with the state it was made in: both from one statement, so that a page is never kept under another state. */
function makePage(viewer: Viewer, buildId: string, before: DiaryCursor | null) {
  const queryOf = before ? olderPageOf : pageOf;
  return queryOf(viewer.role).get({ viewerId: viewer.id, buildId, ...before });
}

const etagOf = (role: Role) =>
  sql<string>`'"${sql.raw(isStaffRole(role) ? 's' : 'c')}' || ${builds.diaryRevision} || '"'`;

const stateOf = preparedByRole((on, reader) =>
  on
    .select({ buildId: builds.id, etag: etagOf(reader.role) })
    .from(builds)
    .where(and(eq(builds.orderNumber, sql.placeholder('orderNumber')), buildIsVisible(reader)))
    .prepare(),
);

const preparePages = (hasCursor: boolean) =>
  preparedByRole((on, reader) =>
    on
      .select({ etag: etagOf(reader.role), page: sql<string>`(${pageJson(reader.role, hasCursor)})` })
      .from(builds)
      .where(and(eq(builds.id, sql.placeholder('buildId')), buildIsVisible(reader)))
      .prepare(),
  );

const pageOf = preparePages(false);
const olderPageOf = preparePages(true);

/**
 * The page of the outer query's build. SQLite writes the JSON: one row crosses into JavaScript instead of one for each
 * entry and photo, and a body that is not JSON comes out as null instead of failing the page. The joins are crossed
 * because that keeps SQLite to the order of the entries.
 */
function pageJson(role: Role, hasCursor: boolean): SQL {
  const shopSide = sql`, 'audience', e.audience, 'state', e.state, 'authorId', e.author_id`;
  const older = sql`and (${entries.datedAt}, ${entries.id}) < (${sql.placeholder('datedAt')}, ${sql.placeholder('id')})`;
  const newestFirst = sql`${entries.datedAt} desc, ${entries.id} desc`;
  return sql`
    select json_object(
      'entries', json_group_array(json_object('id', e.id, 'stage', s.name, 'author', u.name,
          'department', u.department, 'datedAt', e.dated_at, 'edited', e.edited_at is not null,
          'body', json(case when json_valid(e.body) then e.body else 'null' end),
          'photos', json((${photosOfEntry})), 'readings', json((${readingsOfEntry})),
          'shows', json((${showsOfEntry})) ${isStaffRole(role) ? shopSide : sql``})) filter (where e.place <= ${PAGE}),
      'next', iif(count(*) > ${PAGE}, max(e.dated_at || '.' || e.id) filter (where e.place = ${PAGE}), null))
    from (select ${entries.id}, ${entries.datedAt}, ${entries.body}, ${entries.editedAt}, ${entries.audience}, ${entries.state},
        ${entries.authorId}, ${entries.stageId}, row_number() over (order by ${newestFirst}) as place
      from ${entries}
      where ${entries.buildId} = ${builds.id} and ${entryIsVisible({ role })} ${hasCursor ? older : sql``}
      order by ${newestFirst} limit ${PAGE + 1}) e
    cross join ${users} u on u.id = e.author_id cross join ${buildStages} s on s.id = e.stage_id`;
}

const photosOfEntry = sql`
  select json_group_array(json_object('id', p.id, 'widthPx', p.width_px, 'heightPx', p.height_px,
    'blur', p.blur_data_url, 'alt', p.alt, 'widthsPx', p.variant_widths_px))
  from (select id, width_px, height_px, blur_data_url, alt, variant_widths_px from ${photos}
    where entry_id = e.id and state = 'ready' order by position) p`;

const readingsOfEntry = sql`
  select json_group_array(json(case when json_valid(r.shown) then r.shown else 'null' end))
  from (select shown from ${readings} where entry_id = e.id order by position) r`;

const showsOfEntry = sql`
  select json_group_array(p.label) from (select label from ${proofs} where entry_id = e.id and label <> '' order by rowid) p`;
