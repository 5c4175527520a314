import { and, desc, eq, inArray, sql } from 'drizzle-orm';
import { listReps } from './answerers';
import { touchDiary } from './builds';
import { queueMail } from './outbox';
import { askForSignOff } from './sign-off-asking';
import { freezeGround } from './spec-freeze';
import { requireCan } from './standing';
import { db, write, type Tx } from '../client';
import { buildIsVisible } from '../scope';
import { builds, changeRequests, signOffs, users } from '../schema';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { changeContent, changeTitle } from '@/lib/specs/change-words';
import { contentHashOf } from '@/lib/specs/content-hash';
import { freezeOf } from '@/lib/specs/freeze';
import type { ChangeAsked, ChangeDeclined, ChangeOffer } from '@/lib/validation/specs';
import type { Viewer } from '@/lib/viewer';

/**
 * The owner's wish for an item that is frozen. One at a time for each item.
 * @throws OutOfReach, Denied, or BadInput when the item is not in the last version, can still change, or is asked about
 */
export function requestChange(
  viewer: Viewer,
  { orderNumber, itemKey, wish }: ChangeAsked,
  nowMs: number,
): Promise<string> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'change.ask', orderNumber, tx);
    await requireFrozen(tx, build.id, itemKey, nowMs);
    const open = and(
      eq(changeRequests.buildId, build.id),
      eq(changeRequests.itemKey, itemKey),
      inArray(changeRequests.state, ['asked', 'offered']),
    );
    const [earlier] = await tx.select({ id: changeRequests.id }).from(changeRequests).where(open);
    if (earlier)
      throw new BadInput({ wish: 'You have asked for a change of this already. The shop’s answer comes first.' });
    const [asked] = await tx
      .insert(changeRequests)
      .values({ buildId: build.id, itemKey, wish, state: 'asked', askedById: viewer.id, createdAt: nowMs })
      .returning({ id: changeRequests.id });
    if (!asked) throw new Error('an insert without a row');
    for (const userId of await listReps(tx, build.id, nowMs)) {
      const mail = { kind: 'change_asked', userId, about: { changeId: asked.id } } as const;
      await queueMail(tx, { ...mail, dedupeKey: `change_asked/${asked.id}/${userId}` }, nowMs);
    }
    await touchDiary(tx, build.id);
    return asked.id;
  });
}

async function requireFrozen(tx: Tx, buildId: string, itemKey: string, nowMs: number): Promise<void> {
  const { agreed, stages } = await freezeGround(tx, buildId);
  const item = agreed?.items.find(({ key }) => key === itemKey);
  if (!item)
    throw new BadInput({ itemKey: 'That item is not in the spec that was sent to you. Choose one from the list.' });
  if (freezeOf(item, stages, nowMs).state === 'open')
    throw new BadInput({
      wish: `“${item.label}” can still change without a change request. Ask the shop, and it goes into the next version.`,
    });
}

async function requireRequest(tx: Tx, viewer: Viewer, requestId: string) {
  const [request] = await tx
    .select({
      id: changeRequests.id,
      buildId: builds.id,
      orderNumber: builds.orderNumber,
      itemKey: changeRequests.itemKey,
      wish: changeRequests.wish,
      state: changeRequests.state,
      askedById: changeRequests.askedById,
    })
    .from(changeRequests)
    .innerJoin(builds, eq(builds.id, changeRequests.buildId))
    .where(and(eq(changeRequests.id, requestId), buildIsVisible(viewer)));
  if (!request) throw new OutOfReach();
  await requireCan(viewer, 'change.offer', request.orderNumber, tx);
  if (request.state === 'signed' || request.state === 'declined')
    throw new Denied('conflict', 'This change request has been settled already. Load the page again to see how.');
  return request;
}

/**
 * Puts price and days on a wish, and before the owner to be signed. Offering anew takes the place of the offer before.
 * @returns the order number @throws OutOfReach, Denied, or BadInput
 */
export function offerChange(viewer: Viewer, offer: ChangeOffer, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const request = await requireRequest(tx, viewer, offer.requestId);
    const { priceCents, extraDays } = { priceCents: offer.price, extraDays: offer.extraDays };
    await tx
      .update(changeRequests)
      .set({ state: 'offered', priceCents, extraDays, offeredById: viewer.id, offeredAt: nowMs })
      .where(eq(changeRequests.id, request.id));
    const { agreed } = await freezeGround(tx, request.buildId);
    const label = agreed?.items.find(({ key }) => key === request.itemKey)?.label ?? request.itemKey;
    const content = changeContent({ itemKey: request.itemKey, label, wish: request.wish, priceCents, extraDays });
    const build = { id: request.buildId, orderNumber: request.orderNumber };
    const wish = {
      kind: 'change' as const,
      changeRequestId: request.id,
      title: changeTitle(label),
      message: offer.message,
      dueOn: offer.dueOn,
      blocksStageKey: null,
      contentHash: contentHashOf(content),
    };
    await askForSignOff(tx, viewer, build, wish, nowMs);
    return request.orderNumber;
  });
}

/** Tells the owner that the shop cannot do it, and why. @returns the order number @throws OutOfReach or Denied */
export function declineChange(viewer: Viewer, { requestId, answer }: ChangeDeclined, nowMs: number): Promise<string> {
  return write(async (tx) => {
    const request = await requireRequest(tx, viewer, requestId);
    await tx
      .update(changeRequests)
      .set({ state: 'declined', answer, offeredById: viewer.id, offeredAt: nowMs })
      .where(eq(changeRequests.id, request.id));
    await tx
      .update(signOffs)
      .set({ state: 'withdrawn' })
      .where(and(eq(signOffs.changeRequestId, request.id), inArray(signOffs.state, ['asked', 'change_asked'])));
    const mail = { kind: 'change_declined', userId: request.askedById, about: { changeId: request.id } } as const;
    await queueMail(tx, { ...mail, dedupeKey: `change_declined/${request.id}` }, nowMs);
    await touchDiary(tx, request.buildId);
    return request.orderNumber;
  });
}

/** The wishes of a build for frozen items, newest first, with the sign-off that waits for each. @throws OutOfReach, Denied */
export async function listChangeRequests(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  const latest = sql<
    string | null
  >`(select ${signOffs.id} from ${signOffs} where ${signOffs.changeRequestId} = ${changeRequests.id} and ${signOffs.state} <> 'superseded' order by ${signOffs.askedAt} desc limit 1)`;
  return db()
    .select({
      id: changeRequests.id,
      itemKey: changeRequests.itemKey,
      wish: changeRequests.wish,
      state: changeRequests.state,
      priceCents: changeRequests.priceCents,
      extraDays: changeRequests.extraDays,
      answer: changeRequests.answer,
      offeredAt: changeRequests.offeredAt,
      createdAt: changeRequests.createdAt,
      askedBy: users.name,
      signOffId: signOffs.id,
      signedAt: signOffs.answeredAt,
    })
    .from(changeRequests)
    .innerJoin(users, eq(users.id, changeRequests.askedById))
    .leftJoin(signOffs, eq(signOffs.id, latest))
    .where(eq(changeRequests.buildId, build.id))
    .orderBy(desc(changeRequests.createdAt))
    .limit(50);
}

export type ChangeRequestRow = Awaited<ReturnType<typeof listChangeRequests>>[number];
