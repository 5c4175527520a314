import { and, desc, eq, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { touchDiary } from './builds';
import { askForSignOff } from './sign-off-asking';
import { requireDraft, requireSound } from './spec-drafts';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { specDrafts, specVersions, signOffs, users } from '../schema';
import { newId } from '../schema/columns';
import { can } from '@/lib/access';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { Side } from '@/lib/specs/compare';
import { contentHashOf } from '@/lib/specs/content-hash';
import type { SpecDocument } from '@/lib/specs/document';
import type { SpecSending } from '@/lib/validation/specs';
import type { Viewer } from '@/lib/viewer';

/**
 * Makes a version of the draft that will never change, and puts it before the owner to be signed.
 * @throws OutOfReach, Denied ('conflict' when the draft was saved meanwhile), or BadInput
 */
export function sendVersion(
  viewer: Viewer,
  sending: SpecSending,
  nowMs: number,
): Promise<{ number: number; signOffId: string }> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'spec.send', sending.orderNumber, tx);
    const draft = await requireDraft(tx, build.id, sending.revision);
    await requireSound(tx, build.id, draft.document, nowMs);
    const version = await addVersion(tx, build.id, draft.document, viewer, nowMs);
    const signOffId = await askForSignOff(
      tx,
      viewer,
      build,
      {
        kind: 'spec',
        specVersionId: version.id,
        title: `Spec, version ${version.number}`,
        message: sending.message,
        dueOn: sending.dueOn,
        blocksStageKey: sending.blocksStageKey,
        contentHash: version.contentHash,
      },
      nowMs,
    );
    await touchDiary(tx, build.id);
    return { number: version.number, signOffId };
  });
}

async function addVersion(tx: Tx, buildId: string, document: SpecDocument, viewer: Viewer, nowMs: number) {
  const [last] = await tx
    .select({ number: specVersions.number, contentHash: specVersions.contentHash })
    .from(specVersions)
    .where(eq(specVersions.buildId, buildId))
    .orderBy(desc(specVersions.number))
    .limit(1);
  const contentHash = contentHashOf(document);
  if (last?.contentHash === contentHash)
    throw new BadInput({ form: `Nothing has changed since version ${last.number} went out. Change something first.` });
  const version = { id: newId(), number: (last?.number ?? 0) + 1, contentHash };
  await tx.insert(specVersions).values({ ...version, buildId, document, sentById: viewer.id, sentAt: nowMs });
  return version;
}

const sender = alias(users, 'sender');
const latest = sql`(select id from sign_offs where spec_version_id = ${specVersions.id} order by asked_at desc limit 1)`;

const columns = {
  id: specVersions.id,
  number: specVersions.number,
  sentAt: specVersions.sentAt,
  sentBy: sender.name,
  signOffId: signOffs.id,
  state: signOffs.state,
  answeredAt: signOffs.answeredAt,
  signedName: signOffs.signedName,
  /** The owner's words when they asked for a change. */
  answer: signOffs.answer,
};

const versions = () =>
  db()
    .select(columns)
    .from(specVersions)
    .innerJoin(sender, eq(sender.id, specVersions.sentById))
    .leftJoin(signOffs, eq(signOffs.id, latest));

/** The versions that were sent, newest first, and how the owner answered each. @throws OutOfReach, Denied */
export async function listVersions(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  return versions().where(eq(specVersions.buildId, build.id)).orderBy(desc(specVersions.number)).limit(100);
}

export type VersionRow = Awaited<ReturnType<typeof listVersions>>[number];

/** The content of one version; `latest` for the last one sent. Null where there is none. @throws OutOfReach, Denied */
export async function findVersion(viewer: Viewer, orderNumber: string, which: number | 'latest') {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  const [found] = await db()
    .select({ number: specVersions.number, document: specVersions.document, sentAt: specVersions.sentAt })
    .from(specVersions)
    .where(and(eq(specVersions.buildId, build.id), which === 'latest' ? undefined : eq(specVersions.number, which)))
    .orderBy(desc(specVersions.number))
    .limit(1);
  return found ?? null;
}

/** The contents of two sides. @throws OutOfReach when one is not there for this viewer, Denied */
export async function requireComparison(viewer: Viewer, orderNumber: string, from: Side, to: Side) {
  const [before, after] = [await sideOf(viewer, orderNumber, from), await sideOf(viewer, orderNumber, to)];
  return { before, after };
}

async function sideOf(viewer: Viewer, orderNumber: string, side: Side): Promise<SpecDocument> {
  if (side !== 'draft') {
    const version = await findVersion(viewer, orderNumber, side);
    if (!version) throw new OutOfReach();
    return version.document;
  }
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  if (!can(viewer.role, build.standing, 'spec.edit')) throw new OutOfReach();
  const [draft] = await db()
    .select({ document: specDrafts.document })
    .from(specDrafts)
    .where(eq(specDrafts.buildId, build.id));
  if (!draft) throw new OutOfReach();
  return draft.document;
}
