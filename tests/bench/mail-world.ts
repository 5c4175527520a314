import { sql } from 'drizzle-orm';
import { Database } from '@/db/client';
import { migrateDatabase } from '@/db/migrate';

const HOUR_MS = 3_600_000;
export const NEW_PAGES = 3;

/** The numbers from 0 up to `count`, as the table `n`. */
const numbers = (count: number) =>
  sql`with recursive n(i) as (select 0 union all select i + 1 from n where i + 1 < ${count})`;
/** An id of 22 letters, as the program's own are. */
const newId = sql`substr(lower(hex(randomblob(11))), 1, 22)`;
const WORDS =
  'The second coat went on this morning after a night in the warm room, and the grain has come up the way we hoped. ' +
  'We levelled it by hand, looked at it under the lamp, and there is one spot near the heel that wants another day.';

const people = (builds: number, readers: number, cadence: string, nowMs: number) => [
  sql`insert into shop (id, name, time_zone) values (1, 'Quillhaven Guitar Works', 'Europe/Lisbon')`,
  sql`insert into departments (key, name, position) values ('neck', 'Neck & frets', 1)`,
  sql`insert into routes (id, name) values ('solid', 'Solid body')`,
  sql`insert into users (id, email, name, role, department, created_at)
      values ('builder', 'builder@quillhaven.example', 'Wren Okafor', 'builder', 'neck', ${nowMs})`,
  sql`${numbers(readers)} insert into users (id, email, name, role, time_zone, time_zone_asked_at, created_at)
      select 'reader-' || i, 'reader-' || i || '@clients.example', 'Reader ' || i, 'buyer',
        case i % 3 when 0 then 'Europe/Lisbon' when 1 then 'America/New_York' else 'Asia/Tokyo' end, ${nowMs}, ${nowMs} from n`,
  sql`insert into mail_settings (user_id, cadence, hour_local, next_digest_at)
      select id, ${cadence}, 8, iif(${cadence} = 'at_once', null, ${nowMs}) from users where role = 'buyer'`,
  sql`${numbers(builds)} insert into builds (id, order_number, instrument, finish_name, finish_hex, scale_length_in, route_id, ordered_at, created_at)
      select 'build-' || i, 'Q-' || (10000 + i), 'Nightjar', 'Oxblood', '#5a1a1f', 25.5, 'solid', ${nowMs}, ${nowMs} from n`,
  sql`insert into build_stages (id, build_id, position, key, name, department, usual_days, started_at)
      select 'stage-' || id, id, 0, 'neck', 'Neck & frets', 'neck', 10, ${nowMs} from builds`,
  sql`insert into assignments (id, build_id, user_id, started_at) select 'a-' || id, id, 'builder', ${nowMs} from builds`,
  sql`${numbers(readers)} insert into build_people (build_id, user_id, standing, created_at)
      select 'build-' || (i % ${sql.raw(String(builds))}), 'reader-' || i, iif(i < ${builds}, 'owner', 'companion'), ${nowMs} from n`,
];

/** Three new pages a build with a photo each; the three share their bytes. */
const pages = (nowMs: number) => [
  sql`${numbers(NEW_PAGES)} insert into entries (id, build_id, stage_id, author_id, body, body_text, audience, state, dated_at, idempotency_key, created_at)
      select ${newId}, b.id, 'stage-' || b.id, 'builder', json_object('type', 'doc', 'content', json_array(json_object('type', 'paragraph',
        'content', json_array(json_object('type', 'text', 'text', ${WORDS}))))), ${WORDS}, 'buyer', 'published',
        ${nowMs - 9 * HOUR_MS} + i * ${HOUR_MS}, b.id || '-' || i, ${nowMs} from n, builds b`,
  sql`insert into photos (id, build_id, entry_id, uploader_id, upload_key, state, label, content_type, size_bytes, sha256, original_key, out_prefix,
        width_px, height_px, variant_widths_px, alt, position, expires_at, created_at)
      select ${newId}, e.build_id, e.id, 'builder', e.id, 'ready', 'IMG.jpg', 'image/jpeg', 4200000, hex(randomblob(22)), 'original/' || e.id,
        'out/' || e.build_id, 4000, 3000, '320,640,1280,2048', 'The heel under the lamp', 0, ${nowMs}, ${nowMs} from entries e`,
  sql`insert into diary_events (build_id, entry_id, at) select build_id, id, ${nowMs} from entries`,
];

type MailWorld = {
  file: string;
  builds: number;
  readers: number;
  cadence: 'daily' | 'at_once';
  hasPages: boolean;
  nowMs: number;
};

/** A database with builds, their builder and their readers; with `hasPages` everybody's digest is due, and full. */
export async function fillMailWorld({ file, builds, readers, cadence, hasPages, nowMs }: MailWorld): Promise<void> {
  const database = new Database(`file:${file}`);
  await migrateDatabase(database);
  await database.write(async (tx) => {
    for (const statement of [...people(builds, readers, cadence, nowMs), ...(hasPages ? pages(nowMs) : [])])
      await tx.run(statement);
  });
  database.close();
}
