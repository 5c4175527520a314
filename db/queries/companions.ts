import { and, eq } from 'drizzle-orm';
import { recordEvent } from './audit';
import { addPerson } from './people';
import { requireCan } from './standing';
import { write } from '../client';
import { buildPeople, builds, users } from '../schema';
import { isStaffRole } from '@/lib/access';
import { BadInput, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';

/** The owner lets somebody look on. A new address is invited; nobody looks on while the build is held from view. */
export function addCompanion(
  viewer: Viewer,
  orderNumber: string,
  person: { name: string; email: string },
  nowMs: number,
): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'companion.manage', orderNumber, tx);
    const [row] = await tx.select({ heldUntilAt: builds.heldUntilAt }).from(builds).where(eq(builds.id, build.id));
    if (row?.heldUntilAt && row.heldUntilAt > nowMs) {
      throw new BadInput({ email: 'This build is held from view. Companions can be added when the hold ends.' });
    }
    const [known] = await tx
      .select({ id: users.id, role: users.role })
      .from(users)
      .where(eq(users.email, person.email));
    if (known && isStaffRole(known.role))
      throw new BadInput({ email: 'Use a private address: this one belongs to the shop.' });
    const userId = known?.id ?? (await addPerson(tx, viewer, { ...person, role: 'buyer', department: null }, nowMs));
    const added = await tx
      .insert(buildPeople)
      .values({ buildId: build.id, userId, standing: 'companion' })
      .onConflictDoNothing()
      .returning({ userId: buildPeople.userId });
    if (added.length === 0) throw new BadInput({ email: 'This person is on the build already.' });
    await recordEvent(
      tx,
      { actorId: viewer.id, action: 'companion_added', buildId: build.id, subjectId: userId },
      nowMs,
    );
  });
}

/** Who looked on does not any more, from their next request on. @throws OutOfReach, or Denied for all but the owner */
export function removeCompanion(viewer: Viewer, orderNumber: string, userId: string, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'companion.manage', orderNumber, tx);
    const companion = and(
      eq(buildPeople.buildId, build.id),
      eq(buildPeople.userId, userId),
      eq(buildPeople.standing, 'companion'),
    );
    const removed = await tx.delete(buildPeople).where(companion).returning({ userId: buildPeople.userId });
    if (removed.length === 0) throw new OutOfReach();
    await recordEvent(
      tx,
      { actorId: viewer.id, action: 'companion_removed', buildId: build.id, subjectId: userId },
      nowMs,
    );
  });
}
