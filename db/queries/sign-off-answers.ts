import { and, eq } from 'drizzle-orm';
import { listReps, staffOn } from './answerers';
import { recordEvent } from './audit';
import { touchDiary } from './builds';
import { queueMail } from './outbox';
import type { SessionViewer } from './sessions';
import { requireCan } from './standing';
import { write, type Tx } from '../client';
import { buildIsVisible } from '../scope';
import { builds, changeRequests, signOffs } from '../schema';
import { can, isStaffRole } from '@/lib/access';
import { hashToken } from '@/lib/auth/secrets';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { signedNameProblem } from '@/lib/sign-offs/signed-name';
import type { ChangeWish, Signature } from '@/lib/validation/sign-offs';
import type { Viewer } from '@/lib/viewer';

async function findAsked(tx: Tx, viewer: Viewer, signOffId: string) {
  const [signOff] = await tx
    .select({
      id: signOffs.id,
      buildId: signOffs.buildId,
      orderNumber: builds.orderNumber,
      title: signOffs.title,
      state: signOffs.state,
      contentHash: signOffs.contentHash,
      changeRequestId: signOffs.changeRequestId,
      askedById: signOffs.askedById,
    })
    .from(signOffs)
    .innerJoin(builds, eq(builds.id, signOffs.buildId))
    .where(and(eq(signOffs.id, signOffId), buildIsVisible(viewer)));
  if (!signOff) throw new OutOfReach();
  return signOff;
}

type Asked = Awaited<ReturnType<typeof findAsked>>;

/** The guard of both answers, with a sentence for each way in which this is not the viewer's to answer. */
async function requireAnswerable(tx: Tx, viewer: Viewer, signOffId: string): Promise<Asked> {
  const signOff = await findAsked(tx, viewer, signOffId);
  const { standing } = await requireCan(viewer, 'diary.read', signOff.orderNumber, tx);
  if (!can(viewer.role, standing, 'sign_off.answer')) {
    throw new Denied(
      'not_allowed',
      isStaffRole(viewer.role)
        ? 'Only the owner signs. Nobody of the shop can do it for them.'
        : 'Only the owner of this build signs. You are looking on.',
    );
  }
  if (signOff.state !== 'asked') throw await whyNotOpen(tx, signOff);
  return signOff;
}

async function whyNotOpen(tx: Tx, { id, title, state }: Asked): Promise<Denied> {
  if (state === 'signed') return new Denied('conflict', `“${title}” is signed already. Nothing is left to do.`);
  if (state === 'withdrawn')
    return new Denied('conflict', 'The shop has taken this back. There is nothing to sign any more.');
  const [next] = await tx.select({ title: signOffs.title }).from(signOffs).where(eq(signOffs.replacesId, id)).limit(1);
  if (state === 'superseded')
    return new Denied(
      'conflict',
      `“${title}” can no longer be signed: “${next?.title ?? 'a later one'}” has taken its place. Go back to the sign-offs and open that one.`,
    );
  return new Denied(
    'conflict',
    'You asked for a change to this, and the shop is at it. It comes back to you to be signed; write to your rep if it may stay as it was.',
  );
}

/**
 * The owner's signature under exactly what the sign-off shows, once, with the session it came from.
 * @returns the order number
 * @throws OutOfReach, Denied with a sentence, or BadInput for `name`
 */
export function signSignOff(
  viewer: SessionViewer,
  { signOffId, name }: Signature,
  nowMs: number,
): Promise<{ orderNumber: string }> {
  return write(async (tx) => {
    const signOff = await requireAnswerable(tx, viewer, signOffId);
    const problem = signedNameProblem(name, viewer.name);
    if (problem) throw new BadInput({ name: problem });
    if (signOff.changeRequestId) await signChange(tx, signOff.changeRequestId);
    await answer(tx, viewer, signOff, { state: 'signed', signedName: viewer.name }, nowMs);
    return { orderNumber: signOff.orderNumber };
  });
}

async function signChange(tx: Tx, changeRequestId: string): Promise<void> {
  const signed = await tx
    .update(changeRequests)
    .set({ state: 'signed' })
    .where(and(eq(changeRequests.id, changeRequestId), eq(changeRequests.state, 'offered')))
    .returning({ id: changeRequests.id });
  if (signed.length === 0)
    throw new Denied('conflict', 'The shop’s offer no longer stands as it is written here. Reload the page.');
}

/** The owner's words on what should be different, once. @throws OutOfReach, or Denied with a sentence */
export function askForChange(
  viewer: SessionViewer,
  { signOffId, words }: ChangeWish,
  nowMs: number,
): Promise<{ orderNumber: string }> {
  return write(async (tx) => {
    const signOff = await requireAnswerable(tx, viewer, signOffId);
    await answer(tx, viewer, signOff, { state: 'change_asked', answer: words }, nowMs);
    return { orderNumber: signOff.orderNumber };
  });
}

type Answer = { state: 'signed'; signedName: string } | { state: 'change_asked'; answer: string };

async function answer(tx: Tx, viewer: SessionViewer, signOff: Asked, given: Answer, nowMs: number): Promise<void> {
  const { id, buildId } = signOff;
  await tx
    .update(signOffs)
    .set({ ...given, answeredById: viewer.id, answeredAt: nowMs, sessionHash: hashToken(viewer.sessionId) })
    .where(eq(signOffs.id, id));
  for (const userId of await listAwaiting(tx, signOff, nowMs)) {
    const mail = { kind: 'sign_off_answered', userId, about: { signOffId: id } } as const;
    await queueMail(tx, { ...mail, dedupeKey: `sign_off_answered/${id}/${userId}` }, nowMs);
  }
  const action = given.state === 'signed' ? 'sign_off_signed' : 'sign_off_change_asked';
  // What was in front of the owner goes into the chained record too.
  await recordEvent(tx, { actorId: viewer.id, action, buildId, subjectId: id, reason: signOff.contentHash }, nowMs);
  await touchDiary(tx, buildId);
}

/** Who hears the answer: whoever asked, or the reps of the build where they have left it or are away. */
async function listAwaiting(tx: Tx, { buildId, askedById }: Asked, nowMs: number): Promise<string[]> {
  const onBuild = await staffOn(tx, buildId, nowMs);
  return onBuild.some(({ id, isAway }) => id === askedById && !isAway) ? [askedById] : listReps(tx, buildId, nowMs);
}

/** The shop takes back what is not signed yet. Taking it back twice is once. @throws OutOfReach or Denied */
export function withdrawSignOff(viewer: Viewer, signOffId: string, nowMs: number): Promise<{ orderNumber: string }> {
  return write(async (tx) => {
    const { id, buildId, orderNumber, title, state } = await findAsked(tx, viewer, signOffId);
    await requireCan(viewer, 'sign_off.ask', orderNumber, tx);
    if (state === 'withdrawn') return { orderNumber };
    if (state !== 'asked' && state !== 'change_asked') {
      const why = state === 'signed' ? 'is signed, and stays so' : 'was replaced before';
      throw new Denied('conflict', `“${title}” ${why}. Send the new one in its place instead.`);
    }
    await tx
      .update(signOffs)
      .set({ state: 'withdrawn', answeredById: viewer.id, answeredAt: nowMs })
      .where(eq(signOffs.id, id));
    await recordEvent(tx, { actorId: viewer.id, action: 'sign_off_withdrawn', buildId, subjectId: id }, nowMs);
    await touchDiary(tx, buildId);
    return { orderNumber };
  });
}
