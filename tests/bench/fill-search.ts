import { sql } from 'drizzle-orm';
import { Database } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import { seeded } from './made-history';

export const BUILDS = 2000;
export const ENTRIES = 120_000;
export const LETTERS = 50_000;
const STAFF = 12;
const LETTERS_A_QUESTION = 5;
const WORDS_A_TEXT = 32;
const ROWS_AT_ONCE = 5000;
const DAY_MS = 86_400_000;

const common = (
  'the and of to a in it is was on for with at from this that we had by an coat neck fret finish clear dry glue board ' +
  'heel maple ash walnut sand buff bridge nut string relief action joint clamp lamp grain burst edge binding inlay dot ' +
  'headstock tuner pickup cavity radius level crown stain oil wash tint morning night room warm week photo sample'
).split(' ');

/** Words of a shop's diary, the common ones first; the rest are names of parts, jigs and people that come up now and then. */
export const vocabulary = [...common, ...Array.from({ length: 6000 }, (_, n) => `jig${n.toString(36)}`)];

/** As words come in a language: the n-th about n times rarer than the first. */
const picked = (random: () => number) =>
  vocabulary[Math.floor(Math.exp(random() * Math.log(vocabulary.length))) - 1] ?? 'the';

const textOf = (random: () => number) => Array.from({ length: WORDS_A_TEXT }, () => picked(random)).join(' ');

const numbers = (count: number) =>
  sql`with recursive n(i) as (select 0 union all select i + 1 from n where i + 1 < ${count})`;
const staff = sql.raw(String(STAFF));

const worldStatements = (nowMs: number) => [
  sql`insert into shop (id, name, time_zone) values (1, 'Quillhaven Guitar Works', 'Europe/Lisbon')`,
  sql`insert into departments (key, name, position) values ('neck', 'Neck & frets', 1)`,
  sql`insert into routes (id, name) values ('solid', 'Solid body')`,
  sql`insert into topics (id, name, position, answered_by, department) values ('neck', 'Wood & neck', 1, 'department', 'neck')`,
  sql`${numbers(STAFF)} insert into users (id, email, name, role, department, created_at)
      select 'staff-' || i, 'staff-' || i || '@quillhaven.example', 'Bench hand ' || i, iif(i = 0, 'rep', 'builder'), 'neck', ${nowMs} from n`,
  sql`${numbers(BUILDS)} insert into users (id, email, name, role, created_at)
      select 'owner-' || i, 'owner-' || i || '@clients.example', 'Owner ' || i, 'buyer', ${nowMs} from n`,
  sql`${numbers(BUILDS)} insert into builds (id, order_number, instrument, finish_name, finish_hex, scale_length_in, route_id, ordered_at, created_at)
      select 'build-' || i, 'Q-' || (10000 + i), 'Nightjar', 'Oxblood', '#5a1a1f', 25.5, 'solid', ${nowMs}, ${nowMs} from n`,
  sql`${numbers(BUILDS)} insert into build_stages (id, build_id, position, key, name, department, usual_days, started_at)
      select 'stage-' || i, 'build-' || i, 1, 'neck', 'Neck', 'neck', 10, ${nowMs} from n`,
  sql`${numbers(BUILDS)} insert into build_people (build_id, user_id, standing, created_at)
      select 'build-' || i, 'owner-' || i, 'owner', ${nowMs} from n`,
  sql`${numbers(3)} insert into assignments (id, build_id, user_id, started_at)
      select builds.id || '-' || n.i, builds.id, 'staff-' || ((builds.rowid + n.i) % ${staff}), ${nowMs} from builds, n`,
  sql`insert into standing_assignments (id, user_id, started_at) values ('every-build', 'staff-0', ${nowMs})`,
  sql`${numbers(LETTERS / LETTERS_A_QUESTION)} insert into questions (id, build_id, topic_id, asked_by_id, subject, state, idempotency_key, last_letter_at, created_at)
      select 'question-' || i, 'build-' || (i % ${sql.raw(String(BUILDS))}), 'neck', 'owner-' || (i % ${sql.raw(String(BUILDS))}), 'A question', 'answered', 'key-' || i, ${nowMs}, ${nowMs} from n`,
];

const entriesOf = (texts: string, nowMs: number) => sql`insert into entries
    (id, build_id, stage_id, author_id, body, body_text, audience, state, dated_at, idempotency_key, created_at)
  select 'entry-' || (value ->> 0), 'build-' || ((value ->> 0) % ${sql.raw(String(BUILDS))}), 'stage-' || ((value ->> 0) % ${sql.raw(String(BUILDS))}),
    'staff-' || ((value ->> 0) % ${staff}), '{"type":"doc","content":[]}', value ->> 1, iif((value ->> 0) % 8 = 5, 'shop', 'buyer'),
    'published', ${nowMs - 100 * DAY_MS} + (value ->> 0) * 60000, 'entry-' || (value ->> 0), ${nowMs} from json_each(${texts})`;

const lettersOf = (texts: string, nowMs: number) => sql`insert into letters
    (id, question_id, author_id, side, body, body_text, idempotency_key, written_at)
  select 'letter-' || (value ->> 0), 'question-' || ((value ->> 0) / ${sql.raw(String(LETTERS_A_QUESTION))}), 'staff-' || ((value ->> 0) % ${staff}), 'shop',
    '{"type":"doc","content":[]}', value ->> 1, 'letter-' || (value ->> 0), ${nowMs - 100 * DAY_MS} + (value ->> 0) * 60000 from json_each(${texts})`;

/** A database file with 120,000 entries and 50,000 letters over 2,000 builds, indexed as the product indexes them. */
export async function fillForSearch(file: string, nowMs: number): Promise<void> {
  const random = seeded(2417);
  const database = new Database(`file:${file}`);
  await migrateDatabase(database);
  await database.write(async (tx) => {
    for (const statement of worldStatements(nowMs)) await tx.run(statement);
    const batches = (count: number) =>
      Array.from({ length: Math.ceil(count / ROWS_AT_ONCE) }, (_, n) => n * ROWS_AT_ONCE);
    const textsFrom = (first: number) =>
      JSON.stringify(Array.from({ length: ROWS_AT_ONCE }, (_, n) => [first + n, textOf(random)]));
    for (const first of batches(ENTRIES)) await tx.run(entriesOf(textsFrom(first), nowMs));
    for (const first of batches(LETTERS)) await tx.run(lettersOf(textsFrom(first), nowMs));
  });
  await database.client.execute('analyze');
  database.close();
}
