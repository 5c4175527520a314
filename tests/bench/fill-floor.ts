import { sql } from 'drizzle-orm';
import { Database } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import { buildStatements, newId, numbers, peopleStatements, sessionsStatement, shopStatements } from './fill';

const DAY_MS = 86_400_000;
/** Of all builds the first this many are on the floor; the others were delivered before. */
export const ON_FLOOR = 500;
export const DELIVERED = 120;
const STAGES = 8;

/** The eight stages of the route, with the shop's estimates; each takes two to three working weeks. */
const routeStatements = [
  sql`${numbers(STAGES)} insert into route_stages
        (id, route_id, position, key, name, department, usual_days, best_days, likely_days, worst_days, silence_days)
      select ${newId}, 'solid', i, 'stage-' || i, 'Stage ' || i, case i % 3 when 0 then 'wood' when 1 then 'neck' else 'finish' end, 12, 5, 9, 20, 12 from n`,
];

/** Days that build `b` took for each stage, made of its number; the last of a build on the floor is still going on. */
const stageDays = sql.raw(`(8 + (b.rowid * 7 + s.position * 5) % 9)`);

const progressStatements = (nowMs: number) => [
  sql`update build_stages set started_at = null, finished_at = null`,
  sql`update builds set rack = 'rack ' || (1 + rowid % 40), finish_hex = printf('#%06x', (rowid * 2654435761) & 16777215),
        delivered_at = case when rowid > ${ON_FLOOR} then ${nowMs} - (rowid - ${ON_FLOOR}) * ${2 * DAY_MS} end`,
  // Stage by stage backwards from the day of delivery, or from some days ago in the stage that a build is in.
  sql`with recursive place(build_id, position, at, started, finished) as (
        select b.id, b.position, b.ended, b.ended - b.days * ${DAY_MS}, iif(b.delivered_at is null, null, b.ended)
        from (select b.id, b.delivered_at, s.position, coalesce(b.delivered_at, ${nowMs}) as ended,
                iif(b.delivered_at is null, 1 + (b.rowid * 5) % 11, ${stageDays}) as days
              from builds b join build_stages s on s.build_id = b.id
                and s.position = iif(b.delivered_at is null, b.rowid % ${sql.raw(String(STAGES))}, ${sql.raw(String(STAGES - 1))})) b
        union all
        select p.build_id, s.position, p.started, p.started - ${stageDays} * ${DAY_MS}, p.started
        from place p join builds b on b.id = p.build_id
          join build_stages s on s.build_id = p.build_id and s.position = p.position - 1)
      update build_stages set started_at = place.started, finished_at = place.finished from place
      where place.build_id = build_stages.build_id and place.position = build_stages.position`,
  sql`insert into standing_assignments (id, user_id, started_at) values ('leads-all', 'staff-0', ${nowMs})`,
  // One page for each build on the floor: up to three weeks ago its owner saw something.
  sql`insert into entries (id, build_id, stage_id, author_id, body, body_text, audience, state, dated_at, idempotency_key, created_at)
      select ${newId}, b.id, s.id, 'staff-1', '{"type":"doc","content":[]}', '', 'buyer', 'published',
        ${nowMs} - (b.rowid % 21) * ${DAY_MS}, b.id, ${nowMs}
      from builds b join build_stages s on s.build_id = b.id and s.position = 0 where b.delivered_at is null`,
];

/** The owner of every eighth build on the floor waits for an answer, of staff-0 to staff-11 in turn. */
const questionStatements = (nowMs: number) => [
  sql`insert into topics (id, name, position, answered_by, department) values ('neck', 'Wood & neck', 1, 'department', 'neck')`,
  sql`insert into questions (id, build_id, topic_id, asked_by_id, subject, pen_holder_id, state, due_at, idempotency_key, last_letter_at, created_at)
      select ${newId}, b.id, 'neck', p.user_id, 'Which fret wire?', 'staff-' || (b.rowid % 12), 'waiting', ${nowMs + DAY_MS}, b.id, ${nowMs}, ${nowMs}
      from builds b join build_people p on p.build_id = b.id where b.delivered_at is null and b.rowid % 8 = 0`,
];

/** A database file with five hundred builds on the floor, at all stages, and the history of those before them. */
export async function fillFloor(file: string, _builds: number, nowMs: number): Promise<void> {
  const database = new Database(`file:${file}`);
  await migrateDatabase(database);
  await database.write(async (tx) => {
    const statements = [
      ...shopStatements,
      ...routeStatements,
      ...peopleStatements(ON_FLOOR + DELIVERED, nowMs),
      ...buildStatements(ON_FLOOR + DELIVERED, nowMs),
      ...progressStatements(nowMs),
      ...questionStatements(nowMs),
      sessionsStatement(ON_FLOOR + DELIVERED, nowMs),
    ];
    for (const statement of statements) await tx.run(statement);
  });
  database.close();
}
