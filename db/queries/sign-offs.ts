import { and, asc, desc, eq, gt, inArray, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { ownerNameOf } from './owners';
import { requireCan } from './standing';
import { db } from '../client';
import { buildIsVisible, signOffIsVisible } from '../scope';
import { builds, buildStages, signOffs, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import { OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

const PAGE = 60;
const MAX_OF_BUILD = 300;
const asker = alias(users, 'asker');
const answerer = alias(users, 'answerer');

const blocks = sql<
  string | null
>`(select ${buildStages.name} from ${buildStages} where ${buildStages.buildId} = ${signOffs.buildId} and ${buildStages.key} = ${signOffs.blocksStageKey})`;

/** To its owner the owner is "you": null. */
const ownerFor = (viewer: Viewer) => (isStaffRole(viewer.role) ? ownerNameOf(signOffs.buildId) : sql<null>`null`);

const rowColumns = (viewer: Viewer) => ({
  id: signOffs.id,
  orderNumber: builds.orderNumber,
  instrument: builds.instrument,
  kind: signOffs.kind,
  title: signOffs.title,
  itemKey: signOffs.itemKey,
  dueOn: signOffs.dueOn,
  state: signOffs.state,
  blocks,
  askedAt: signOffs.askedAt,
  askedBy: asker.name,
  answeredAt: signOffs.answeredAt,
  signedName: signOffs.signedName,
  replacesId: signOffs.replacesId,
  ownerName: ownerFor(viewer),
});

const rowsFor = (viewer: Viewer) =>
  db()
    .select(rowColumns(viewer))
    .from(signOffs)
    .innerJoin(builds, eq(builds.id, signOffs.buildId))
    .innerJoin(asker, eq(asker.id, signOffs.askedById))
    .$dynamic();

const openFirst = sql`case ${signOffs.state} when 'asked' then 0 when 'change_asked' then 1 else 2 end`;

/** The sign-offs of one build: what waits first, then the rest, newest first. @throws OutOfReach or Denied */
export async function listBuildSignOffs(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'sign_off.read', orderNumber);
  return rowsFor(viewer)
    .where(and(eq(signOffs.buildId, build.id), buildIsVisible(viewer), signOffIsVisible(viewer)))
    .orderBy(openFirst, desc(signOffs.askedAt), desc(signOffs.id))
    .limit(MAX_OF_BUILD);
}

export type SignOffRow = Awaited<ReturnType<typeof listBuildSignOffs>>[number];

type Place = { dueOn: string; id: string };

/** @returns null for anything that is not a place this product wrote */
export function parseSignOffPlace(text: unknown): Place | null {
  const match = /^(\d{4}-\d{2}-\d{2})\.([\w-]{1,40})$/.exec(typeof text === 'string' ? text : '');
  return match ? { dueOn: match[1] ?? '', id: match[2] ?? '' } : null;
}

/** What waits on any of the viewer's builds, by the day to sign by, with the place of the next page or null. */
export async function listSignOffQueue(viewer: Viewer, place: Place | null) {
  const later = place
    ? or(gt(signOffs.dueOn, place.dueOn), and(eq(signOffs.dueOn, place.dueOn), gt(signOffs.id, place.id)))
    : undefined;
  const rows = await rowsFor(viewer)
    .where(
      and(inArray(signOffs.state, ['asked', 'change_asked']), buildIsVisible(viewer), signOffIsVisible(viewer), later),
    )
    .orderBy(asc(signOffs.dueOn), asc(signOffs.id))
    .limit(PAGE + 1);
  const page = rows.slice(0, PAGE);
  const last = page.at(-1);
  return { signOffs: page, next: rows.length > PAGE && last ? `${last.dueOn}.${last.id}` : null };
}

/**
 * Who waits for whom: the open sign-offs of these builds, or of all the viewer reaches, by the day to sign by. A
 * companion gets none.
 */
export function listWaitingSignOffs(viewer: Viewer, buildIds?: string[]) {
  return db()
    .select({
      id: signOffs.id,
      buildId: signOffs.buildId,
      orderNumber: builds.orderNumber,
      kind: signOffs.kind,
      title: signOffs.title,
      dueOn: signOffs.dueOn,
      state: signOffs.state,
      blocksStageKey: signOffs.blocksStageKey,
      blocks,
      ownerName: ownerFor(viewer),
    })
    .from(signOffs)
    .innerJoin(builds, eq(builds.id, signOffs.buildId))
    .where(
      and(
        inArray(signOffs.state, ['asked', 'change_asked']),
        buildIds ? inArray(signOffs.buildId, buildIds) : undefined,
        buildIsVisible(viewer),
        signOffIsVisible(viewer),
      ),
    )
    .orderBy(asc(signOffs.dueOn), asc(signOffs.id))
    .limit(500);
}

export type WaitingSignOff = Awaited<ReturnType<typeof listWaitingSignOffs>>[number];

/** One sign-off as its page heads it, with all others of its build to tell which took whose place. @throws OutOfReach */
export async function requireSignOff(viewer: Viewer, signOffId: string) {
  const [row] = await db()
    .select({
      ...rowColumns(viewer),
      buildId: signOffs.buildId,
      finishHex: builds.finishHex,
      message: signOffs.message,
      contentHash: signOffs.contentHash,
      specVersionId: signOffs.specVersionId,
      documentId: signOffs.documentId,
      changeRequestId: signOffs.changeRequestId,
      concession: signOffs.concession,
      answer: signOffs.answer,
      answeredBy: answerer.name,
      blocksStageKey: signOffs.blocksStageKey,
    })
    .from(signOffs)
    .innerJoin(builds, eq(builds.id, signOffs.buildId))
    .innerJoin(asker, eq(asker.id, signOffs.askedById))
    .leftJoin(answerer, eq(answerer.id, signOffs.answeredById))
    .where(and(eq(signOffs.id, signOffId), buildIsVisible(viewer), signOffIsVisible(viewer)));
  if (!row) throw new OutOfReach();
  const { standing } = await requireCan(viewer, 'sign_off.read', row.orderNumber);
  return { ...row, standing, ofBuild: await listBuildSignOffs(viewer, row.orderNumber) };
}

export type SignOffPage = Awaited<ReturnType<typeof requireSignOff>>;
