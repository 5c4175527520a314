import { and, asc, eq } from 'drizzle-orm';
import { freezeGround } from './spec-freeze';
import { requireCan } from './standing';
import { db, write, type Db, type Tx } from '../client';
import { builds, buildStages, documents, materials, specDrafts, specTemplates, users } from '../schema';
import { BadInput, Denied } from '@/lib/errors';
import { checkDocument, type SpecSurroundings } from '@/lib/specs/check';
import type { SpecDocument } from '@/lib/specs/document';
import { frozenEdits } from '@/lib/specs/freeze';
import { fitTemplate } from '@/lib/specs/fit-template';
import type { SpecEdit } from '@/lib/validation/specs';
import type { Viewer } from '@/lib/viewer';

/** The templates a spec can start from, in the shop's order. */
export async function listTemplates(viewer: Viewer, orderNumber: string) {
  await requireCan(viewer, 'spec.edit', orderNumber);
  return db()
    .select({ id: specTemplates.id, name: specTemplates.name })
    .from(specTemplates)
    .orderBy(asc(specTemplates.position));
}

/** The spec the shop is working on, for staff; null while nobody has begun one. @throws OutOfReach, Denied */
export async function findDraft(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'spec.edit', orderNumber);
  return readDraft(db(), build.id);
}

export type Draft = NonNullable<Awaited<ReturnType<typeof findDraft>>>;

async function readDraft(reader: Db | Tx, buildId: string) {
  const [draft] = await reader
    .select({
      document: specDrafts.document,
      revision: specDrafts.revision,
      editedBy: users.name,
      editedAt: specDrafts.editedAt,
    })
    .from(specDrafts)
    .innerJoin(users, eq(users.id, specDrafts.editedById))
    .where(eq(specDrafts.buildId, buildId));
  return draft ?? null;
}

/** The draft as it is now, in a write. @throws Denied 'conflict' when it is not the revision this editor saw */
export async function requireDraft(tx: Tx, buildId: string, revision: number): Promise<Draft> {
  const draft = await readDraft(tx, buildId);
  if (!draft) throw new Denied('conflict', 'There is no draft yet. Start one from a template first.');
  if (draft.revision !== revision)
    throw new Denied(
      'conflict',
      `${draft.editedBy} has saved this spec since you opened it. Nothing you typed is lost: look at both above, then save again.`,
    );
  return draft;
}

/** Begins the draft of a build from a template, once: where there is a draft already, it stays. */
export function startDraft(viewer: Viewer, orderNumber: string, templateId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'spec.edit', orderNumber, tx);
    const [template] = await tx
      .select({ document: specTemplates.document })
      .from(specTemplates)
      .where(eq(specTemplates.id, templateId));
    if (!template) throw new BadInput({ templateId: 'Choose what to start from in the list.' });
    const [row] = await tx.select({ scaleIn: builds.scaleLengthIn }).from(builds).where(eq(builds.id, build.id));
    const { stageKeys } = await surroundingsOf(tx, build.id);
    const document = fitTemplate(template.document, { scaleLengthIn: row?.scaleIn ?? null, stageKeys });
    await tx
      .insert(specDrafts)
      .values({ buildId: build.id, document, editedById: viewer.id, editedAt: nowMs })
      .onConflictDoNothing();
  });
}

/**
 * Saves an edit of the draft. @returns its new revision
 * @throws OutOfReach, Denied ('conflict' when somebody saved in between), or BadInput at `items.<key>.<field>`
 */
export function saveDraft(viewer: Viewer, edit: SpecEdit, nowMs: number): Promise<number> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'spec.edit', edit.orderNumber, tx);
    const draft = await requireDraft(tx, build.id, edit.revision);
    await requireSound(tx, build.id, edit.document, nowMs);
    const revision = draft.revision + 1;
    await tx
      .update(specDrafts)
      .set({ document: edit.document, revision, editedById: viewer.id, editedAt: nowMs })
      .where(eq(specDrafts.buildId, build.id));
    return revision;
  });
}

/** @throws BadInput with a sentence for every field that cannot be, or may no longer, change */
export async function requireSound(tx: Tx, buildId: string, next: SpecDocument, nowMs: number): Promise<void> {
  const around = await surroundingsOf(tx, buildId);
  const ground = await freezeGround(tx, buildId);
  const sentences = { ...checkDocument(next, around), ...frozenEdits({ ...ground, next }, nowMs) };
  if (Object.keys(sentences).length > 0) throw new BadInput(sentences);
}

async function surroundingsOf(tx: Tx, buildId: string): Promise<SpecSurroundings> {
  const stages = await tx.select({ key: buildStages.key }).from(buildStages).where(eq(buildStages.buildId, buildId));
  const woods = await tx.select({ key: materials.key }).from(materials);
  const drawings = await tx
    .select({ id: documents.id })
    .from(documents)
    .where(and(eq(documents.buildId, buildId), eq(documents.state, 'ready')));
  return {
    stageKeys: new Set(stages.map(({ key }) => key)),
    materialKeys: new Set(woods.map(({ key }) => key)),
    drawingIds: new Set(drawings.map(({ id }) => id)),
  };
}
