import { asc, count } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { findBrokenLink, listAccessEvents, listAuditEvents, recordEvent, recordRefusal } from '@/db/queries/audit';
import { stepIn } from '@/db/queries/assignments';
import { holdBuild } from '@/db/queries/holds';
import { auditEvents } from '@/db/schema';
import { OutOfReach } from '@/lib/errors';
import { openTestDatabase } from '../support/database';
import { makeBuild, makePerson, NOW_MS, openShop } from '../support/world';

const { database } = await openTestDatabase();
await openShop();

const events = () => db().select().from(auditEvents).orderBy(asc(auditEvents.seq));
const record = (actorId: string) => write((tx) => recordEvent(tx, { actorId, action: 'signed_in' }, NOW_MS));

async function lastSeq(): Promise<number> {
  await record('somebody');
  return (await events()).at(-1)?.seq ?? 0;
}

describe('an audit event, once written', () => {
  const row = `(seq, at, action, outcome, previous_hash, hash)`;
  test.each([
    { how: 'UPDATE', statement: `UPDATE audit_events SET actor_id = 'another' WHERE seq = ?` },
    { how: 'DELETE', statement: `DELETE FROM audit_events WHERE seq = ?` },
    { how: 'REPLACE', statement: `REPLACE INTO audit_events ${row} VALUES (?, 1, 'opened', 'done', 'x', 'y')` },
    {
      how: 'UPSERT',
      statement: `INSERT INTO audit_events ${row} VALUES (?, 1, 'opened', 'done', 'x', 'y') ON CONFLICT (seq) DO UPDATE SET action = 'opened'`,
    },
  ])('cannot be changed by $how', async ({ statement }) => {
    const seq = await lastSeq();
    const before = await events();
    await expect(database.client.execute({ sql: statement, args: [seq] })).rejects.toThrow('append-only');
    expect(await events()).toEqual(before);
  });

  test('holds ids, never an address or a name', async () => {
    const admin = await makePerson('admin', { name: 'Odalys Ferrand', email: 'odalys@people.example' });
    const build = await makeBuild();
    await stepIn(admin, { orderNumber: build.orderNumber, reason: 'A wrong finish was reported' }, NOW_MS);
    const written = JSON.stringify(await events());
    expect(written).toContain(admin.id);
    expect(written).not.toMatch(/Odalys|people\.example/);
  });
});

describe('the chain', () => {
  test('holds over everything written so far, and over 50 events written at once', async () => {
    await Promise.all(Array.from({ length: 50 }, (_, n) => record(`person ${n}`)));
    expect(await findBrokenLink()).toBeNull();
  });

  test.each([
    { field: 'actor_id', value: 'another' },
    { field: 'at', value: 1 },
    { field: 'outcome', value: 'refused' },
    { field: 'reason', value: 'rewritten' },
    { field: 'build_id', value: 'another' },
    { field: 'hash', value: '0'.repeat(64) },
  ])('names the event whose $field somebody edited behind the triggers', async ({ field, value }) => {
    const edited = await lastSeq();
    await record('after');
    const original = await database.client.execute({
      sql: `SELECT ${field} AS was FROM audit_events WHERE seq = ?`,
      args: [edited],
    });
    await forge(`UPDATE audit_events SET ${field} = ? WHERE seq = ?`, [value, edited]);
    expect(await findBrokenLink()).toBe(edited);
    await forge(`UPDATE audit_events SET ${field} = ? WHERE seq = ?`, [original.rows[0]?.was ?? null, edited]);
    expect(await findBrokenLink()).toBeNull();
  });

  test('names the event after one that was cut out', async () => {
    const cut = await lastSeq();
    await record('the next');
    const { rows } = await database.client.execute({ sql: 'SELECT * FROM audit_events WHERE seq = ?', args: [cut] });
    await forge('DELETE FROM audit_events WHERE seq = ?', [cut]);
    expect(await findBrokenLink()).toBe(cut + 1);
    const values = Object.values(rows[0] ?? {});
    await forge(`INSERT INTO audit_events VALUES (${values.map(() => '?').join(',')})`, values);
    expect(await findBrokenLink()).toBeNull();
  });
});

/** What somebody with the file in their hands could do: drop the triggers, edit, and put them back. */
async function forge(statement: string, args: (string | number | bigint | ArrayBuffer | null)[]): Promise<void> {
  const triggers = await database.client.execute(`SELECT name, sql FROM sqlite_master WHERE type = 'trigger'`);
  for (const { name } of triggers.rows) await database.client.execute(`DROP TRIGGER ${String(name)}`);
  await database.client.execute({ sql: statement, args });
  for (const trigger of triggers.rows) await database.client.execute(String(trigger.sql));
}

describe('a refusal', () => {
  test('is written down for a build that exists, and nothing is for one that does not', async () => {
    const [stranger, build] = [await makePerson('buyer'), await makeBuild()];
    const [before] = await db().select({ n: count() }).from(auditEvents);
    await recordRefusal(stranger.id, 'Q-none', NOW_MS);
    await recordRefusal(stranger.id, build.orderNumber, NOW_MS);
    const [after] = await db().select({ n: count() }).from(auditEvents);
    expect((after?.n ?? 0) - (before?.n ?? 0)).toBe(1);
    expect((await events()).at(-1)).toMatchObject({ actorId: stranger.id, buildId: build.id, outcome: 'refused' });
  });
});

describe('reading the log', () => {
  test('an owner reads who was let onto their own build and why, and no refusals', async () => {
    const [owner, rep, admin] = [await makePerson('buyer'), await makePerson('rep'), await makePerson('admin')];
    const build = await makeBuild({ owner, staff: [{ person: rep }] });
    const other = await makeBuild();
    await stepIn(admin, { orderNumber: build.orderNumber, reason: 'Checking the delivery papers' }, NOW_MS);
    await stepIn(admin, { orderNumber: other.orderNumber, reason: 'Another matter altogether' }, NOW_MS);
    await recordRefusal(rep.id, build.orderNumber, NOW_MS);
    await holdBuild(rep, build.orderNumber, null, NOW_MS);
    const read = await listAccessEvents(owner, build.orderNumber);
    expect(read.map(({ action, reason, subjectName }) => ({ action, reason, subjectName }))).toEqual([
      { action: 'opened', reason: null, subjectName: null },
      { action: 'stepped_in', reason: 'Checking the delivery papers', subjectName: admin.name },
    ]);
    await expect(listAccessEvents(owner, other.orderNumber)).rejects.toThrow(OutOfReach);
  });

  test.each(['buyer', 'artist', 'builder', 'rep'] as const)('a %s cannot read the whole log', async (role) => {
    await expect(listAuditEvents(await makePerson(role), Number.MAX_SAFE_INTEGER)).rejects.toThrow(OutOfReach);
  });
});
