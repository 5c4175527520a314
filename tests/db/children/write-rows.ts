import { Database } from '@/db/client';
import { rateLimits } from '@/db/schema';

/** Once told to, writes rows through the queue, several at a time, and tells each that was acknowledged, until killed. */
const [url = '', name = ''] = process.argv.slice(2);
const database = new Database(url);

async function writeForever(lane: number): Promise<void> {
  for (let n = 0; ; n++) {
    const key = `${name}/${lane}/${n}`;
    await database.write((tx) => tx.insert(rateLimits).values({ key, level: n, updatedAt: 0 }));
    process.send?.(key);
  }
}

await new Promise((told) => process.once('message', told));
await Promise.all([0, 1, 2, 3].map(writeForever));
