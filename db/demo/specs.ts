import type { EnteredBuild } from './enter-build';
import type { Cast } from './people';
import { declinedWish, edited, edits, firstDocument, storyOf, wishes, type SpecStory } from './spec-stories';
import { DAY_MS } from './timeline';
import type { Tx } from '../client';
import { changeRequests, materials, signOffs, specDrafts, specTemplates, specVersions } from '../schema';
import { newId } from '../schema/columns';
import { materialRows } from '@/lib/craft/materials';
import { changeContent, changeTitle } from '@/lib/specs/change-words';
import { contentHashOf } from '@/lib/specs/content-hash';
import type { SpecDocument } from '@/lib/specs/document';
import { starterTemplates } from '@/lib/specs/templates';

type Scene = { tx: Tx; build: EnteredBuild; designerId: string; nowMs: number };
type Answer = 'asked' | 'signed' | 'superseded' | 'change_asked';
type Sent = { document: SpecDocument; number: number; sentAt: number; answer: Answer; words?: string };

/** Templates, materials, and a spec for each of these builds: none yet, a draft, or what was sent, signed and changed. */
export async function enterSpecs(tx: Tx, builds: EnteredBuild[], cast: Cast, nowMs: number): Promise<void> {
  await tx.insert(materials).values(materialRows());
  await tx.insert(specTemplates).values(starterTemplates.map((template, position) => ({ ...template, position })));
  const designer = cast.builders.find(({ department }) => department === 'design & machining') ?? cast.admin;
  for (const [index, build] of builds.entries()) {
    const story = storyOf(build.plan, index);
    if (story !== 'none') await enterSpec({ tx, build, designerId: designer.id, nowMs }, story, index);
  }
}

async function enterSpec(scene: Scene, story: SpecStory, index: number): Promise<void> {
  const sent = versionsOf(scene, story);
  let replacesId: string | null = null;
  for (const version of sent) replacesId = await enterVersion(scene, version, replacesId);
  const last = sent.at(-1);
  const document = last?.document ?? firstDocument(scene.build.plan);
  const editedAt = last?.sentAt ?? scene.nowMs - 6 * 3_600_000;
  await scene.tx
    .insert(specDrafts)
    .values({ buildId: scene.build.id, document, revision: sent.length + 1, editedById: scene.designerId, editedAt });
  if (story === 'four versions') await enterDeclined(scene);
  if (story === 'change asked' || story === 'change offered' || story === 'change signed')
    await enterChange(scene, story, index, document);
}

function versionsOf({ build }: Scene, story: SpecStory): Sent[] {
  if (story === 'draft') return [];
  const orderedAt = build.plan.stages[0]?.startedAt ?? 0;
  const documents = [firstDocument(build.plan)];
  for (const said of edits) documents.push(edited(documents.at(-1) ?? { items: [] }, said));
  const version = (number: number, days: number, answer: Answer, words?: string): Sent[] => {
    const document = documents[number - 1];
    return document ? [{ document, number, sentAt: orderedAt + days * DAY_MS, answer, words }] : [];
  };
  const wish = 'Steel frets, please, and a fuller neck. The rest is just what I hoped for.';
  if (story === 'waiting') return version(1, 1, 'asked');
  if (story === 'change wished') return version(1, 1, 'change_asked', wish);
  if (story === 'signed twice') return [...version(1, 1, 'superseded', wish), ...version(2, 9, 'signed')];
  if (story !== 'four versions') return version(1, 1, 'signed');
  const thinner = 'Could the first fret be a touch thinner?';
  return [
    ...version(1, 1, 'superseded', wish),
    ...version(2, 6, 'superseded', thinner),
    ...version(3, 11, 'signed'),
    ...version(4, 18, 'signed'),
  ];
}

async function enterVersion(scene: Scene, sent: Sent, replacesId: string | null): Promise<string> {
  const { tx, build } = scene;
  const { document, number, sentAt } = sent;
  const version = { id: newId(), contentHash: contentHashOf(document) };
  await tx
    .insert(specVersions)
    .values({ ...version, buildId: build.id, number, document, sentById: build.rep.id, sentAt });
  const ahead = build.plan.stages.find(({ startedAt }) => startedAt === null);
  return enterSignOff(scene, {
    kind: 'spec',
    specVersionId: version.id,
    contentHash: version.contentHash,
    title: `Spec, version ${number}`,
    message: number === 1 ? 'This is everything we spoke about. Take your time with it.' : 'With what you asked for.',
    state: sent.answer,
    askedAt: sentAt,
    answer: sent.words ?? null,
    blocksStageKey: sent.answer === 'asked' ? (ahead?.key ?? null) : null,
    replacesId,
  });
}

type SignOffRow = Pick<
  typeof signOffs.$inferInsert,
  | 'kind'
  | 'specVersionId'
  | 'changeRequestId'
  | 'contentHash'
  | 'title'
  | 'message'
  | 'answer'
  | 'blocksStageKey'
  | 'replacesId'
> & { state: Answer; askedAt: number };

const DUE_DAYS = 7;
const ANSWER_DAYS = 2;

async function enterSignOff({ tx, build, nowMs }: Scene, row: SignOffRow): Promise<string> {
  const { askedAt, state } = row;
  const dueAt = Math.max(askedAt + DUE_DAYS * DAY_MS, state === 'asked' ? nowMs + 2 * DAY_MS : 0);
  const answeredAt = Math.min(askedAt + ANSWER_DAYS * DAY_MS, nowMs - 3_600_000);
  const isAnswered = state === 'signed' || row.answer != null;
  const id = newId();
  await tx.insert(signOffs).values({
    ...row,
    id,
    buildId: build.id,
    dueOn: new Date(dueAt).toISOString().slice(0, 10),
    askedById: build.rep.id,
    answeredById: isAnswered ? build.owner.id : null,
    answeredAt: isAnswered ? answeredAt : null,
    signedName: state === 'signed' ? build.owner.name : null,
  });
  return id;
}

async function enterDeclined({ tx, build, nowMs }: Scene): Promise<void> {
  await tx.insert(changeRequests).values({
    buildId: build.id,
    ...declinedWish,
    state: 'declined',
    askedById: build.owner.id,
    createdAt: nowMs - 30 * DAY_MS,
    offeredById: build.rep.id,
    offeredAt: nowMs - 29 * DAY_MS,
  });
}

async function enterChange(
  scene: Scene,
  story: 'change asked' | 'change offered' | 'change signed',
  index: number,
  document: SpecDocument,
): Promise<void> {
  const { tx, build, nowMs } = scene;
  const wanted = wishes[index % wishes.length] ?? wishes[0];
  const { itemKey, wish, priceCents, extraDays } = wanted;
  const id = newId();
  const offered = { priceCents, extraDays, offeredById: build.rep.id, offeredAt: nowMs - 3 * DAY_MS };
  await tx.insert(changeRequests).values({
    id,
    buildId: build.id,
    itemKey,
    wish,
    state: story === 'change asked' ? 'asked' : story === 'change offered' ? 'offered' : 'signed',
    askedById: build.owner.id,
    createdAt: nowMs - 4 * DAY_MS,
    ...(story === 'change asked' ? {} : offered),
  });
  if (story === 'change asked') return;
  const label = document.items.find(({ key }) => key === itemKey)?.label ?? itemKey;
  await enterSignOff(scene, {
    kind: 'change',
    changeRequestId: id,
    contentHash: contentHashOf(changeContent({ itemKey, label, wish, priceCents, extraDays })),
    title: changeTitle(label),
    message: 'We can do it while the neck is off. It takes the board back to the bench.',
    state: story === 'change offered' ? 'asked' : 'signed',
    askedAt: nowMs - 3 * DAY_MS,
  });
}
