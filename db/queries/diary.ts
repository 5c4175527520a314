import { and, eq, sql } from 'drizzle-orm';
import { db } from '../client';
import { buildIsVisible, entryIsVisible } from '../scope';
import { builds, buildStages, entries, photos, users } from '../schema';
import { isStaffRole } from '@/lib/access';
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
    .select({ id: builds.id, revision: builds.diaryRevision })
    .from(builds)
    .where(and(eq(builds.orderNumber, orderNumber), buildIsVisible(viewer)))
    .limit(1);
  if (!build) throw new OutOfReach(orderNumber);
  return { buildId: build.id, etag: `"${isStaffRole(viewer.role) ? 's' : 'c'}${build.revision}"` };
}

/**
 * One page of a build's diary as JSON text, newest first. SQLite writes the JSON: one row crosses into JavaScript
 * instead of one for each entry and photo, and a body that is not JSON comes out as null instead of failing the page.
 */
export async function diaryPageJson(viewer: Viewer, buildId: string, before: DiaryCursor | null): Promise<string> {
  const row = await db().get<{ page: string }>(diaryPageSql(viewer, buildId, before));
  return row.page;
}

export async function diaryPage(viewer: Viewer, buildId: string, before: DiaryCursor | null): Promise<DiaryPage> {
  const page: DiaryPage = JSON.parse(await diaryPageJson(viewer, buildId, before));
  return page;
}

function diaryPageSql(viewer: Viewer, buildId: string, before: DiaryCursor | null) {
  const shopSide = isStaffRole(viewer.role)
    ? sql`, 'audience', e.audience, 'state', e.state, 'authorId', e.author_id`
    : sql``;
  const older = before ? sql`and (${entries.datedAt}, ${entries.id}) < (${before.datedAt}, ${before.id})` : sql``;
  const page = sql`
    select ${entries.id} as id, ${entries.datedAt} as dated_at, ${entries.body} as body, ${entries.editedAt} as edited_at,
      ${entries.audience} as audience, ${entries.state} as state, ${entries.authorId} as author_id, ${entries.stageId} as stage_id
    from ${entries} join ${builds} on ${builds.id} = ${entries.buildId}
    where ${entries.buildId} = ${buildId} and ${buildIsVisible(viewer)} and ${entryIsVisible(viewer)} ${older}
    order by ${entries.datedAt} desc, ${entries.id} desc limit ${PAGE + 1}`;
  const photosOfEntry = sql`
    select json_group_array(json_object('id', p.id, 'widthPx', p.width_px, 'heightPx', p.height_px,
      'blur', p.blur_data_url, 'alt', p.alt, 'widthsPx', p.variant_widths_px))
    from (select * from ${photos} where entry_id = e.id and state = 'ready' order by position) p`;
  return sql<{ page: string }>`
    with page as materialized (${page})
    select json_object(
      'entries', coalesce((select json_group_array(json_object('id', e.id, 'stage', s.name, 'author', u.name,
          'department', u.department, 'datedAt', e.dated_at, 'edited', e.edited_at is not null,
          'body', json(case when json_valid(e.body) then e.body else 'null' end),
          'photos', json((${photosOfEntry})) ${shopSide}))
        from (select * from page limit ${PAGE}) e
        join ${users} u on u.id = e.author_id join ${buildStages} s on s.id = e.stage_id), json('[]')),
      'next', (select case when (select count(*) from page) > ${PAGE}
        then (select dated_at || '.' || id from page limit 1 offset ${PAGE - 1}) end)
    ) as page`;
}
