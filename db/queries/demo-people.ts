import { asc, desc, eq, isNull, lte, sql } from 'drizzle-orm';
import { db } from '../client';
import { buildPeople, builds, departments, users } from '../schema';

const SHOWN_A_ROLE = 9;

/** Whom a visitor of the demo may be. Only the demo's sign-in page asks, and only when a mail room is configured. */
export async function listDemoPeople() {
  const order = sql<
    string | null
  >`(select ${builds.orderNumber} || ', ' || ${builds.instrument} from ${buildPeople} join ${builds} on ${builds.id} = ${buildPeople.buildId} where ${buildPeople.userId} = ${users.id} order by ${builds.deliveredAt} is not null, ${builds.orderNumber} limit 1)`;
  const place = sql<number>`row_number() over (partition by ${users.role} order by ${users.createdAt}, ${users.id})`;
  const ranked = db()
    .select({
      name: users.name,
      email: users.email,
      role: users.role,
      department: departments.name,
      order: order.as('order_words'),
      place: place.as('place'),
    })
    .from(users)
    .leftJoin(departments, eq(departments.key, users.department))
    .where(isNull(users.disabledAt))
    .as('ranked');
  const rows = await db()
    .select({
      name: ranked.name,
      email: ranked.email,
      role: ranked.role,
      department: ranked.department,
      order: ranked.order,
    })
    .from(ranked)
    .where(lte(ranked.place, SHOWN_A_ROLE))
    .orderBy(asc(ranked.place), desc(ranked.role))
    .limit(40);
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
