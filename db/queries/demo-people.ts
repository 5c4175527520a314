import { asc, eq, isNull, sql } from 'drizzle-orm';
import { db } from '../client';
import { buildPeople, builds, departments, users } from '../schema';

/** Whom a visitor of the demo may be. Only the demo's sign-in page asks, and only when a mail room is configured. */
export async function listDemoPeople() {
  const order = sql<
    string | null
  >`(select ${builds.orderNumber} || ', ' || ${builds.instrument} from ${buildPeople} join ${builds} on ${builds.id} = ${buildPeople.buildId} where ${buildPeople.userId} = ${users.id} order by ${builds.deliveredAt} is not null, ${builds.orderNumber} limit 1)`;
  const rows = await db()
    .select({ name: users.name, email: users.email, role: users.role, department: departments.name, order })
    .from(users)
    .leftJoin(departments, eq(departments.key, users.department))
    .where(isNull(users.disabledAt))
    .orderBy(
      sql`row_number() over (partition by ${users.role} order by ${users.createdAt}, ${users.id})`,
      asc(users.name),
    )
    .limit(26);
  return rows.map(({ department, order: build, ...person }) => ({
    ...person,
    does: doesWhat(person.role, department, build),
  }));
}

function doesWhat(role: string, department: string | null, build: string | null): string {
  if (role === 'builder') return department ?? 'builder';
  if (role === 'rep') return 'answers and releases';
  if (role === 'admin') return 'manages who may see what';
  return build ?? role;
}
