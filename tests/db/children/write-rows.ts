import { Database } from '@/db/client';
import { rateLimits } from '@/db/schema';

/** Writes rows through the queue, several at a time, and tells each one that was acknowledged; until it is killed. */
const [url = '', name = ''] = process.argv.slice(2);
const database = new Database(url);

async function writeForever(lane: number): Promise<void> {
  for (let n = 0; ; n++) {
    const key = `${name}/${lane}/${n}`;
    await database.write((tx) => tx.insert(rateLimits).values({ key, level: n, updatedAt: 0 }));
    process.send?.(key);
  }
}

await Promise.all([0, 1, 2, 3].map(writeForever));
