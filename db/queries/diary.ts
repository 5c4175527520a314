import { and, eq, sql, type SQL } from 'drizzle-orm';
import { db } from '../client';
import { prepared } from '../prepared';
import { buildIsVisible, entryIsVisible } from '../scope';
import { builds, buildStages, entries, photos, users } from '../schema';
import { isStaffRole, type Role } from '@/lib/access';
import { OutOfReach } from '@/lib/errors';
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
  const [build] = await db()
    .select({ buildId: builds.id, etag: etagOf(viewer.role) })
    .from(builds)
    .where(and(eq(builds.orderNumber, orderNumber), buildIsVisible(viewer)))
    .limit(1);
  if (!build) throw new OutOfReach(orderNumber);
  return build;
}

/**
 * A diary's state and its page in one question, so that both are of one moment. SQLite writes the page's JSON: one row
 * crosses into JavaScript instead of one for each entry and photo, and a body that is not JSON comes out as null instead
 * of failing the page.
 * @param known the state that the reader holds already; `page` is null while it is still that
 * @throws OutOfReach
 */
export async function diaryAnswer(
  viewer: Viewer,
  orderNumber: string,
  before: DiaryCursor | null,
  known: string | null,
): Promise<{ etag: string; page: string | null }> {
  const query = pageQuery(viewer.role, builds.orderNumber, before !== null);
  const found = await query().get({ viewerId: viewer.id, build: orderNumber, known, ...before });
  if (!found) throw new OutOfReach(orderNumber);
  return found;
}

/** One page of a build's diary, newest first; without entries when the build is out of reach. */
export async function diaryPage(viewer: Viewer, buildId: string, before: DiaryCursor | null): Promise<DiaryPage> {
  const query = pageQuery(viewer.role, builds.id, before !== null);
  const found = await query().get({ viewerId: viewer.id, build: buildId, known: null, ...before });
  const page: DiaryPage = JSON.parse(found?.page ?? '{"entries":[],"next":null}');
  return page;
}

type BuildKey = typeof builds.orderNumber | typeof builds.id;

/** A role, a key and whether there is a cursor make the text; each that is asked for is built once. */
const pageQueries = new Map<string, ReturnType<typeof preparePage>>();

function pageQuery(role: Role, key: BuildKey, hasCursor: boolean) {
  const name = `${role} ${key.name} ${hasCursor}`;
  const query = pageQueries.get(name) ?? preparePage(role, key, hasCursor);
  pageQueries.set(name, query);
  return query;
}

function preparePage(role: Role, key: BuildKey, hasCursor: boolean) {
  const reader = { id: sql.placeholder('viewerId'), role };
  const etag = etagOf(role);
  return prepared((on) =>
    on
      .select({
        etag,
        page: sql<
          string | null
        >`case when ${etag} is not ${sql.placeholder('known')} then (${pageJson(role, hasCursor)}) end`,
      })
      .from(builds)
      .where(and(eq(key, sql.placeholder('build')), buildIsVisible(reader)))
      .prepare(),
  );
}

const etagOf = (role: Role) =>
  sql<string>`'"${sql.raw(isStaffRole(role) ? 's' : 'c')}' || ${builds.diaryRevision} || '"'`;

/** The page of the outer query's build. The joins are crossed because that keeps SQLite to the order of the entries. */
function pageJson(role: Role, hasCursor: boolean): SQL {
  const shopSide = sql`, 'audience', e.audience, 'state', e.state, 'authorId', e.author_id`;
  const older = sql`and (${entries.datedAt}, ${entries.id}) < (${sql.placeholder('datedAt')}, ${sql.placeholder('id')})`;
  const newestFirst = sql`${entries.datedAt} desc, ${entries.id} desc`;
  return sql`
    select json_object(
      'entries', json_group_array(json_object('id', e.id, 'stage', s.name, 'author', u.name,
          'department', u.department, 'datedAt', e.dated_at, 'edited', e.edited_at is not null,
          'body', json(case when json_valid(e.body) then e.body else 'null' end),
          'photos', json((${photosOfEntry})) ${isStaffRole(role) ? shopSide : sql``})) filter (where e.place <= ${PAGE}),
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
