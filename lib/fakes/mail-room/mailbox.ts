import { randomUUID } from 'node:crypto';
import { mkdir, open, readdir, readFile, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { replaceFile } from '../durable-file';
import { bareAddress } from './address';
import type { Draft } from './draft';

export interface Mail extends Draft {
  id: string;
  /** ISO 8601, UTC. */
  createdAt: string;
  idempotencyKey: string | null;
}

/** What one request handed in. Mails and key are kept in one file, so a crash keeps or loses both together. */
export interface Delivery {
  acceptedAt_ms: number;
  idempotencyKey: string | null;
  /** Hash of the request, to tell a repeat from another request under the same key. */
  fingerprint: string;
  mails: Mail[];
}

export interface Mailbox {
  /** Returns once the delivery is on disk. */
  add(delivery: Delivery): Promise<void>;
  deliveries(): readonly Delivery[];
  /** Newest first; of one address (to, cc or bcc) or of all. */
  mails(to?: string): Mail[];
  find(id: string): Mail | undefined;
  /** Forgets every mail and every idempotency key. */
  empty(): Promise<void>;
}

async function writeDelivery(dataDir: string, delivery: Delivery): Promise<void> {
  const name = `${String(delivery.acceptedAt_ms).padStart(15, '0')}-${randomUUID()}.json`;
  const temporary = join(dataDir, `${name}.part`);
  const handle = await open(temporary, 'wx');
  try {
    await handle.writeFile(JSON.stringify(delivery, null, 2));
    await handle.sync();
  } finally {
    await handle.close();
  }
  await replaceFile(temporary, join(dataDir, name));
}

async function loadDeliveries(dataDir: string): Promise<Delivery[]> {
  const names = (await readdir(dataDir)).sort();
  await Promise.all(names.filter((name) => name.endsWith('.part')).map((name) => rm(join(dataDir, name))));
  const deliveries: Delivery[] = [];
  for (const name of names.filter((other) => other.endsWith('.json'))) {
    const delivery: Delivery = JSON.parse(await readFile(join(dataDir, name), 'utf8'));
    deliveries.push(delivery);
  }
  return deliveries;
}

/** Every bare address a mail goes to, each once. */
export function receivers({ to, cc, bcc }: Mail): string[] {
  return [...new Set([...to, ...cc, ...bcc].map((mailbox) => bareAddress(mailbox) ?? mailbox))];
}

/** Opens the mails kept in a folder; the folder is made when it is missing. */
export async function openMailbox(dataDir: string): Promise<Mailbox> {
  await mkdir(dataDir, { recursive: true });
  let kept = await loadDeliveries(dataDir);
  const newestFirst = () => kept.flatMap(({ mails }) => mails).reverse();
  return {
    add: async (delivery) => {
      await writeDelivery(dataDir, delivery);
      kept.push(delivery);
    },
    deliveries: () => kept,
    mails: (to) => newestFirst().filter((mail) => to === undefined || receivers(mail).includes(to.toLowerCase())),
    find: (id) => newestFirst().find((mail) => mail.id === id),
    empty: async () => {
      kept = [];
      const names = (await readdir(dataDir)).filter((name) => name.endsWith('.json'));
      await Promise.all(names.map((name) => rm(join(dataDir, name), { force: true })));
    },
  };
}
