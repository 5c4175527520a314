import { and, eq, sql, type SQLWrapper } from 'drizzle-orm';
import type { Db, Tx } from '../client';
import { buildPeople, users } from '../schema';

/** The accounts that own a build: one, or none before its owner is put on it. */
export async function listOwnerIds(reader: Db | Tx, buildId: string): Promise<string[]> {
  const owners = await reader
    .select({ id: buildPeople.userId })
    .from(buildPeople)
    .where(and(eq(buildPeople.buildId, buildId), eq(buildPeople.standing, 'owner')));
  return owners.map(({ id }) => id);
}

/** The owner's name as a field of a select; `buildId` is a column of the outer query. */
export const ownerNameOf = (buildId: SQLWrapper) =>
  sql<
    string | null
  >`(select ${users.name} from ${buildPeople} join ${users} on ${users.id} = ${buildPeople.userId} where ${buildPeople.buildId} = ${buildId} and ${buildPeople.standing} = 'owner')`;
