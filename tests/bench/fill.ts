import { createHash } from 'node:crypto';
import { sql } from 'drizzle-orm';
import { Database } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';
import { showWoodRoom } from '@/lib/readings/wood-room';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const STAFF = 12;
export const ENTRIES_A_BUILD = 60;

export const orderNumberOf = (build: number) => `Q-${10_000 + build}`;
/** The cookie of a build's owner; its staff are the persons 0 to 11. */
export const ownerToken = (build: number) => `bench-owner-${build}`;
export const staffToken = (person: number) => `bench-staff-${person}`;

/** The numbers from 0 up to `count`, as the table `n`. */
export const numbers = (count: number) =>
  sql`with recursive n(i) as (select 0 union all select i + 1 from n where i + 1 < ${count})`;
export const newId = sql`lower(hex(randomblob(11)))`;
/** Written out: libSQL binds a number as REAL, and the remainder would be one too. */
const staff = sql.raw(String(STAFF));

export const shopStatements = [
  sql`insert into shop (id, name, time_zone) values (1, 'Quillhaven Guitar Works', 'Europe/Lisbon')`,
  sql`insert into departments (key, name, position) values ('wood', 'Wood room', 1), ('neck', 'Neck & frets', 2), ('finish', 'Finish', 3)`,
  sql`insert into routes (id, name) values ('solid', 'Solid body')`,
];

export const peopleStatements = (builds: number, nowMs: number) => [
  sql`${numbers(STAFF)} insert into users (id, email, name, role, department, created_at)
      select 'staff-' || i, 'staff-' || i || '@quillhaven.example', 'Bench hand ' || i, 'builder', 'neck', ${nowMs} from n`,
  sql`${numbers(builds)} insert into users (id, email, name, role, time_zone_asked_at, created_at)
      select 'owner-' || i, 'owner-' || i || '@clients.example', 'Owner ' || i, 'buyer', ${nowMs}, ${nowMs} from n`,
  sql`insert into mail_settings (user_id, cadence) select id, 'none' from users where role = 'buyer'`,
];

export const buildStatements = (builds: number, nowMs: number) => [
  sql`${numbers(builds)} insert into builds (id, order_number, instrument, finish_name, finish_hex, scale_length_in, route_id, ordered_at, created_at)
      select ${newId}, 'Q-' || (10000 + i), 'Nightjar', 'Oxblood', '#5a1a1f', 25.5, 'solid', ${nowMs - 200 * DAY_MS}, ${nowMs} from n`,
  sql`${numbers(8)} insert into build_stages (id, build_id, position, key, name, department, usual_days, started_at, finished_at)
      select ${newId}, builds.id, i, 'stage-' || i, 'Stage ' || i, 'neck', 10, ${nowMs - 100 * DAY_MS}, case when i < 7 then ${nowMs} end from builds, n`,
  sql`insert into build_people (build_id, user_id, standing, created_at)
      select id, 'owner-' || (substr(order_number, 3) - 10000), 'owner', ${nowMs} from builds`,
  sql`${numbers(3)} insert into assignments (id, build_id, user_id, started_at)
      select ${newId}, builds.id, 'staff-' || ((builds.rowid + i) % ${staff}), ${nowMs} from builds, n`,
];

const air = { kind: 'wood_room', temperatureC: 21, relativeHumidityPercent: 45, moisturePercent: 9.1 } as const;

const WORDS =
  'The second coat went on this morning after a night in the warm room, and the grain has come up the way we hoped. ' +
  'We levelled it by hand, looked at it under the lamp, and there is one spot near the heel that';

/**
 * Entry by entry over all builds, as the days went: the rows of one build lie far apart in the file. One in eight is the
 * shop's own; three or four photos each, and a reading in every third.
 */
const diaryStatements = (builds: number, nowMs: number) => [
  sql`${numbers(ENTRIES_A_BUILD)} insert into entries
        (id, build_id, stage_id, author_id, body, body_text, audience, state, dated_at, idempotency_key, created_at)
      select ${newId}, b.id, s.id, 'staff-' || ((b.rowid + i) % ${staff}),
        json_object('type', 'doc', 'content', json_array(json_object('type', 'paragraph', 'content',
          json_array(json_object('type', 'text', 'text', ${WORDS} || ' wants day ' || i))))),
        ${WORDS} || ' wants day ' || i, iif(i % 8 = 5, 'shop', 'buyer'), 'published',
        ${nowMs - 100 * DAY_MS} + i * ${DAY_MS} + b.rowid, b.id || i, ${nowMs}
      from n cross join builds b join build_stages s on s.build_id = b.id and s.position = i / 8`,
  sql`${numbers(4)} insert into photos
        (id, build_id, entry_id, uploader_id, upload_key, state, label, content_type, size_bytes, sha256, original_key, out_prefix,
         width_px, height_px, blur_data_url, variant_widths_px, alt, position, expires_at, created_at)
      select ${newId}, e.build_id, e.id, e.author_id, e.id || i, 'ready', 'IMG_' || e.rowid || '.jpg', 'image/jpeg', 4200000,
        hex(randomblob(22)), 'original/' || hex(randomblob(16)), 'out/' || hex(randomblob(16)), 4000, 3000,
        'data:image/webp;base64,' || hex(randomblob(114)), '320,640,1280,2048', 'The heel under the lamp', i, ${nowMs}, ${nowMs}
      from entries e join n on i < 3 or e.rowid % 3 = 0`,
  sql`insert into readings (id, build_id, entry_id, position, value, shown)
      select ${newId}, build_id, id, 0, ${JSON.stringify(air)}, ${JSON.stringify(showWoodRoom(air))} from entries where rowid % 3 = 0`,
];

/** Last seen an hour from now: no round pays for writing down that a session was used. */
export function sessionsStatement(builds: number, nowMs: number) {
  const hashOf = (token: string) => createHash('sha256').update(token).digest('hex');
  const owners = Array.from({ length: builds }, (_, i) => ({ id: `owner-${i}`, hash: hashOf(ownerToken(i)) }));
  const staff = Array.from({ length: STAFF }, (_, i) => ({ id: `staff-${i}`, hash: hashOf(staffToken(i)) }));
  return sql`insert into sessions (id, token_hash, user_id, last_seen_at, idle_ends_at, ends_at, created_at)
    select ${newId}, value ->> 'hash', value ->> 'id', ${nowMs + HOUR_MS}, ${nowMs + DAY_MS}, ${nowMs + DAY_MS}, ${nowMs}
    from json_each(${JSON.stringify([...owners, ...staff])})`;
}

/** A database file with so many builds, 60 entries each and ten photos to three entries, written by SQLite itself. */
export async function fillDatabase(file: string, builds: number, nowMs: number): Promise<void> {
  const database = new Database(`file:${file}`);
  await migrateDatabase(database);
  await database.write(async (tx) => {
    const statements = [
      ...shopStatements,
      ...peopleStatements(builds, nowMs),
      ...buildStatements(builds, nowMs),
      ...diaryStatements(builds, nowMs),
      sessionsStatement(builds, nowMs),
    ];
    for (const statement of statements) await tx.run(statement);
  });
  database.close();
}
