import { beforeEach, describe, expect, test } from 'vitest';
import { write } from '@/db/client';
import { declineChange, offerChange, requestChange } from '@/db/queries/change-requests';
import { listChoices, saveChoices } from '@/db/queries/mail-choices';
import { startDraft } from '@/db/queries/spec-drafts';
import { sendVersion } from '@/db/queries/spec-versions';
import { buildStages, specTemplates } from '@/db/schema';
import { signOffCast } from '../../support/sign-off-world';
import { smallSpec } from '../../support/spec';
import { DAY_MS, NOW_MS } from '../../support/world';
import { clock, openStandIns, runJobs } from './stand-ins';

const { mailsTo, behave } = await openStandIns();
await write((tx) =>
  tx.insert(specTemplates).values({ id: 'small', name: 'Small', document: smallSpec(), position: 1 }),
);

beforeEach(async () => {
  await behave();
  clock.nowMs = NOW_MS;
});

/** A build whose spec went out, and whose stages have all begun. */
async function openFrozen(wish: { heldUntilAt?: number } = {}) {
  const cast = await signOffCast(wish);
  const { rep, build } = cast;
  const { orderNumber } = build;
  await startDraft(rep, orderNumber, 'small', NOW_MS);
  const version = { orderNumber, revision: 1, message: '', dueOn: '2026-12-12', blocksStageKey: null };
  await sendVersion(rep, version, NOW_MS);
  await write((tx) => tx.update(buildStages).set({ startedAt: NOW_MS }));
  const ask = () => requestChange(cast.owner, { orderNumber, itemKey: 'nut_width', wish: 'A wider nut.' }, NOW_MS);
  return { ...cast, ask };
}

describe('a change that an owner asks for', () => {
  test('reaches the rep, with the item, the wish and the way to answer it; no builder and no companion', async () => {
    const { rep, builder, companion, build, ask } = await openFrozen();
    await ask();
    await runJobs();
    const [mail] = await mailsTo(rep);
    expect(mail?.subject).toBe('Maren Oduya asks to change what is frozen: Nut width');
    expect(mail?.text).toContain('A wider nut.');
    expect(mail?.text).toContain(`/builds/${build.orderNumber}/spec/changes`);
    for (const other of [builder, companion]) expect(await mailsTo(other)).toEqual([]);
  });

  test('comes in the digest for a rep who chose that', async () => {
    const { rep, ask } = await openFrozen();
    expect((await listChoices(rep)).find(({ kind }) => kind === 'change_asked')).toMatchObject({ choice: 'at_once' });
    await saveChoices(rep, [{ kind: 'change_asked', choice: 'digest' }]);
    await ask();
    await runJobs();
    expect(await mailsTo(rep)).toEqual([]);
    await runJobs(NOW_MS + 7 * DAY_MS);
    expect((await mailsTo(rep))[0]?.text).toContain('asks to change what is frozen: Nut width');
  });

  test('of a build held from view says neither the item nor the wish', async () => {
    const { rep, build, ask } = await openFrozen({ heldUntilAt: Date.now() + 400 * DAY_MS });
    await ask();
    await runJobs();
    const [mail] = await mailsTo(rep);
    expect(mail?.subject).toContain(build.orderNumber);
    for (const secret of ['Nut width', 'wider', build.instrument]) expect(JSON.stringify(mail)).not.toContain(secret);
  });

  test('is not mailed any more once it was answered', async () => {
    const { rep, ask } = await openFrozen();
    const offer = { price: 100, extraDays: 1, message: '', dueOn: '2026-12-12' };
    await offerChange(rep, { requestId: await ask(), ...offer }, NOW_MS);
    await runJobs();
    expect(await mailsTo(rep)).toEqual([]);
  });

  test('that the shop declines tells the owner why', async () => {
    const { owner, rep, ask } = await openFrozen();
    await declineChange(rep, { requestId: await ask(), answer: 'The board is glued.' }, NOW_MS);
    await runJobs();
    const declined = (await mailsTo(owner)).find(({ subject }) => subject === 'A change we cannot make: Nut width');
    expect(declined?.text).toContain('The board is glued.');
  });
});
