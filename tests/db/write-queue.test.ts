import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { createClient } from '@libsql/client';
import { eq, like } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { db, write } from '@/db/client';
import { rateLimits } from '@/db/schema';
import { Denied } from '@/lib/errors';
import { openTestDatabase } from '../support/database';

const { file } = await openTestDatabase();
const children = join(import.meta.dirname, 'children');

/** Returns once the lock is held; `over` is when its holder has gone. */
async function holdLock(heldMs: number, freeMs = 0, bursts = 1): Promise<{ over: Promise<unknown> }> {
  const child = fork(join(children, 'hold-lock.mjs'), [file, heldMs, freeMs, bursts].map(String), { execArgv: [] });
  const over = once(child, 'exit');
  await once(child, 'message');
  return { over };
}

const put = (key: string) => write((tx) => tx.insert(rateLimits).values({ key, level: 1, updatedAt: 0 }));

/** What stands in the file, as another connection reads it. */
async function keysInFile(prefix: string): Promise<Set<string>> {
  const client = createClient({ url: `file:${file}` });
  const { rows } = await client.execute({ sql: 'select key from rate_limits where key like ?', args: [`${prefix}%`] });
  client.close();
  return new Set(rows.map(({ key }) => String(key)));
}

/** Starts `count` writes a few milliseconds apart and sorts their keys by what was said about each. */
async function hammer(prefix: string, count: number) {
  const acknowledged: string[] = [];
  const refused: string[] = [];
  const writes: Promise<void>[] = [];
  for (let n = 0; n < count; n++) {
    const key = `${prefix}${n}`;
    writes.push(
      put(key).then(
        () => void acknowledged.push(key),
        (error: unknown) => {
          if (!(error instanceof Denied) || error.code !== 'busy') throw error;
          refused.push(key);
        },
      ),
    );
    await pause(4);
  }
  await Promise.all(writes);
  return { acknowledged, refused };
}

describe('while another process holds the lock of the file', () => {
  test('every write that was acknowledged is in the file, and of a refused one nothing is', async () => {
    const lock = await holdLock(250, 120, 8);
    const { acknowledged, refused } = await hammer('burst/', 300);
    await lock.over;
    const kept = await keysInFile('burst/');
    expect(acknowledged.filter((key) => !kept.has(key))).toEqual([]);
    expect(refused.filter((key) => kept.has(key))).toEqual([]);
    expect(acknowledged.length + refused.length).toBe(300);
  });

  test('a write that waited too long is refused with a sentence, and the next 100 of 100 after the lock work', async () => {
    const lock = await holdLock(3_000);
    await expect(put('locked/0')).rejects.toMatchObject({ code: 'busy', retryAfterSeconds: 5 });
    await lock.over;
    const after = await hammer('after/', 100);
    expect(after.acknowledged).toHaveLength(100);
    expect(await keysInFile('after/')).toEqual(new Set(after.acknowledged));
    expect(await keysInFile('locked/')).toEqual(new Set());
  });

  test('reading goes on, during the lock and after it', async () => {
    await put('read/0');
    const lock = await holdLock(1_500);
    const waiting = put('read/1').catch((error: unknown) => expect(error).toBeInstanceOf(Denied));
    const read = () => db().select({ key: rateLimits.key }).from(rateLimits).where(eq(rateLimits.key, 'read/0'));
    for (let n = 0; n < 20; n++) {
      expect(await read()).toEqual([{ key: 'read/0' }]);
      await pause(40);
    }
    await Promise.all([waiting, lock.over]);
    expect(await read()).toEqual([{ key: 'read/0' }]);
  });
});

describe('the queue', () => {
  test('a write inside a write is a fault at once, and leaves the queue working', async () => {
    await expect(write(async () => put('nested/inner'))).rejects.toThrow('a write inside a write');
    await put('nested/after');
    expect(await keysInFile('nested/')).toEqual(new Set(['nested/after']));
  });

  test('a write that fails undoes all of itself and holds nobody up', async () => {
    const failing = write(async (tx) => {
      await tx.insert(rateLimits).values({ key: 'failing/half', level: 1, updatedAt: 0 });
      throw new Error('thought better of it');
    });
    const next = put('failing/next');
    await expect(failing).rejects.toThrow('thought better of it');
    await next;
    expect(await keysInFile('failing/')).toEqual(new Set(['failing/next']));
  });

  test('writes happen one after another, in the order in which they were asked for', async () => {
    const order: number[] = [];
    const steps = Array.from({ length: 30 }, (_, n) =>
      write(async (tx) => {
        const before = await tx.select().from(rateLimits).where(like(rateLimits.key, 'order/%'));
        await tx.insert(rateLimits).values({ key: `order/${n}`, level: before.length, updatedAt: 0 });
        order.push(n);
      }),
    );
    await Promise.all(steps);
    expect(order).toEqual(Array.from({ length: 30 }, (_, n) => n));
    const rows = await db().select().from(rateLimits).where(like(rateLimits.key, 'order/%'));
    expect(rows.map(({ level }) => level).sort((a, b) => a - b)).toEqual(order);
  });
});

const startWriter = (name: string) =>
  fork(join(children, 'write-rows.ts'), [`file:${file}`, name], { execArgv: ['--import', 'tsx'] });

/** Lets a child write until it is killed in the middle of it. @returns the keys it had acknowledged by then */
async function writeAndKill(child: ChildProcess, afterMs: number): Promise<string[]> {
  const acknowledged: string[] = [];
  child.on('message', (key) => acknowledged.push(String(key)));
  child.send('go');
  await once(child, 'message');
  await pause(afterMs);
  child.kill('SIGKILL');
  await once(child, 'close');
  return acknowledged;
}

// 20 kills, not the 200 of SECURITY.md P25, so that the suite stays short.
test('what was acknowledged outlives 20 kills of the writing process, and the file is whole after each', async () => {
  let next = startWriter('kill-0');
  for (let kill = 0; kill < 20; kill++) {
    const writer = next;
    next = startWriter(`kill-${kill + 1}`);
    const acknowledged = await writeAndKill(writer, 20 + ((kill * 37) % 120));
    const kept = await keysInFile(`kill-${kill}/`);
    expect(acknowledged.length).toBeGreaterThan(0);
    expect(acknowledged.filter((key) => !kept.has(key))).toEqual([]);
    const client = createClient({ url: `file:${file}` });
    expect((await client.execute('PRAGMA integrity_check')).rows[0]?.integrity_check).toBe('ok');
    expect((await client.execute('PRAGMA foreign_key_check')).rows).toEqual([]);
    client.close();
  }
  next.kill('SIGKILL');
}, 120_000);
