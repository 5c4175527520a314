import { setTimeout as pause } from 'node:timers/promises';
import { createClient } from '@libsql/client';

// Holds the write lock of the file again and again; times in milliseconds.
const file = process.argv[2];
const [heldMs = 0, freeMs = 0, bursts = 1] = process.argv.slice(3).map(Number);
const client = createClient({ url: `file:${file}`, timeout: 5_000 });
for (let burst = 0; burst < bursts; burst++) {
  const lock = await client.transaction('write');
  process.send?.('held');
  await pause(heldMs);
  await lock.rollback();
  process.send?.('free');
  await pause(freeMs);
}
client.close();
process.disconnect?.();
