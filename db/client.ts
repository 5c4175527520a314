import { AsyncLocalStorage } from 'node:async_hooks';
import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { createClient, type Client, type InStatement } from '@libsql/client';
import { drizzle, type LibSQLDatabase } from 'drizzle-orm/libsql';
import { Denied } from '@/lib/errors';
import * as schema from './schema';

export type Db = LibSQLDatabase<typeof schema>;
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];

const BUSY_RETRIES = 5;
const LOCK_WAIT_MS = 100;

function isBusy(error: unknown): boolean {
  for (let cause = error; cause instanceof Error; cause = cause.cause) {
    if ('code' in cause && typeof cause.code === 'string' && /^SQLITE_(BUSY|LOCKED)/.test(cause.code)) return true;
    if (/SQL statements in progress|database is locked/.test(cause.message)) return true;
  }
  return false;
}

/** A client whose single statements are tried once more, on a fresh connection, when another process was in the way. */
function healing(client: Client): Client {
  const execute = client.execute.bind(client);
  client.execute = async (statement: InStatement) => {
    try {
      return await execute(statement);
    } catch (error) {
      if (!isBusy(error)) throw error;
      await client.reconnect();
      return execute(statement);
    }
  };
  return client;
}

const pause = (attempt: number) => new Promise((r) => setTimeout(r, 50 * 2 ** attempt * (0.5 + Math.random())));

/**
 * One database and the one queue through which every write to it goes.
 *
 * A second write transaction in the same process would block the event loop until its time-out, and one SQLITE_BUSY
 * leaves the libSQL connection unable to commit while it still answers "ok"; hence one writer at a time, and a
 * reconnect after every BUSY before the item is tried again from its start.
 */
export class Database {
  readonly client: Client;
  readonly db: Db;
  private tail: Promise<unknown> = Promise.resolve();
  private readonly inside = new AsyncLocalStorage<true>();

  constructor(url: string, authToken?: string) {
    if (url.startsWith('file:')) mkdirSync(dirname(filePath(url)), { recursive: true });
    this.client = healing(createClient({ url, authToken, timeout: LOCK_WAIT_MS, concurrency: 4 }));
    this.db = drizzle(this.client, { schema });
  }

  /**
   * Runs `work` in an immediate transaction behind every write that was asked for before it. It may run again after a
   * lock, so nothing but the database may be touched in it.
   * @throws Denied 'busy' when another process holds the lock through every retry
   */
  write<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
    if (this.inside.getStore()) throw new Error('a write inside a write: pass tx on instead');
    const result = this.tail.then(() => this.attempt(work));
    this.tail = result.catch(() => undefined);
    return result;
  }

  private async attempt<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
    for (let attempt = 0; ; attempt++) {
      try {
        return await this.inside.run(true, () => this.db.transaction(work));
      } catch (error) {
        if (!isBusy(error)) throw error;
        await this.client.reconnect();
        if (attempt >= BUSY_RETRIES) {
          throw new Denied('busy', 'The shop’s records are busy just now. Nothing was changed; please try again.', 5);
        }
        await pause(attempt);
      }
    }
  }

  close() {
    this.client.close();
  }
}

function filePath(url: string): string {
  return url.startsWith('file://') ? fileURLToPath(url) : (url.slice('file:'.length).split('?')[0] ?? '');
}

declare global {
  var flitchbookDatabase: Database | undefined;
}

/** The process's one database; Next loads modules more than once, so it is kept on globalThis. */
export function database(): Database {
  globalThis.flitchbookDatabase ??= new Database(requireUrl(), process.env.DATABASE_AUTH_TOKEN || undefined);
  return globalThis.flitchbookDatabase;
}

/** For reading; what it reads outside `write` may be a moment old. */
export const db = (): Db => database().db;

export const write = <T>(work: (tx: Tx) => Promise<T>): Promise<T> => database().write(work);

function requireUrl(): string {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set; README.md lists every variable.');
  return url;
}
