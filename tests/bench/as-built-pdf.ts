import { Document, Image, Page, renderToBuffer } from '@react-pdf/renderer';
import { and, asc, eq } from 'drizzle-orm';
import { createElement } from 'react';
import { setTimeout as pause } from 'node:timers/promises';
import sharp from 'sharp';
import { Database } from '@/db/client';
import { mailJpegKey } from '@/db/queries/photos';
import { builds, entries, photos, proofs, signOffs, specVersions } from '@/db/schema';
import { storeObject } from '@/lib/storage';
import { starterTemplates } from '@/lib/specs/templates';
import { openApp, type App } from './app';
import { orderNumberOf, staffToken } from './fill';
import { peakMb } from './process-memory';
import { median, valueBelow, type Bench } from './row';

/** fill.ts gives every build 60 entries with 200 photos or one more; the staff of the second are the persons 2 to 4. */
const ORDER = orderNumberOf(1);
const COOKIE = `flitchbook-session=${staffToken(2)}`;
const PHOTOS = 200;
const ROUNDS = 7;

/** As large as the pipeline makes the JPEG that goes on paper, grain and all: no two alike. */
async function picture(seed: number): Promise<Buffer> {
  const [width, height] = [560, 420];
  const grain = { type: 'gaussian', mean: 110 + (seed % 40), sigma: 14 } as const;
  return sharp({ create: { width, height, channels: 3, background: '#000', noise: grain } })
    .modulate({ saturation: 0.4, hue: (seed * 37) % 360 })
    .blur(0.8)
    .jpeg({ quality: 80 })
    .toBuffer();
}

async function secondsOf(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return (performance.now() - start) / 1000;
}

/** Signs a spec for the build, has its entries show every item, and fills the store. @returns its pictures */
async function prepare({ env }: App): Promise<Buffer[]> {
  Object.assign(process.env, env);
  const database = new Database(env.DATABASE_URL);
  const { db } = database;
  const [build] = await db.select({ id: builds.id }).from(builds).where(eq(builds.orderNumber, ORDER));
  const document = starterTemplates[0]?.document;
  if (!build || !document) throw new Error('There is no build or no template to measure with.');
  const shown = await db
    .select({ id: entries.id })
    .from(entries)
    .where(eq(entries.buildId, build.id))
    .orderBy(asc(entries.datedAt));
  await database.write(async (tx) => {
    const version = { id: 'bench-version', buildId: build.id, number: 1, document, contentHash: 'bench' };
    await tx.insert(specVersions).values({ ...version, sentById: 'staff-2', sentAt: 1 });
    const asked = {
      kind: 'spec',
      title: 'Version 1',
      contentHash: 'bench',
      dueOn: '2026-12-01',
      state: 'signed',
    } as const;
    const signed = { answeredById: 'owner-1', answeredAt: 2, signedName: 'Owner 1' };
    await tx
      .insert(signOffs)
      .values({ ...asked, ...signed, buildId: build.id, specVersionId: version.id, askedById: 'staff-2', askedAt: 1 });
    const links = document.items.map(({ key, label }, index) => ({
      itemKey: key,
      label,
      entryId: shown[index % shown.length]?.id ?? '',
    }));
    await tx.insert(proofs).values(links.map((link) => ({ ...link, buildId: build.id, createdById: 'staff-2' })));
  });
  const kept = await db
    .select({ outPrefix: photos.outPrefix })
    .from(photos)
    .where(and(eq(photos.buildId, build.id), eq(photos.state, 'ready')));
  if (kept.length < PHOTOS) throw new Error(`The build has ${kept.length} photos.`);
  const pictures: Buffer[] = [];
  for (const [seed, { outPrefix }] of kept.entries()) {
    const bytes = await picture(seed);
    await storeObject(mailJpegKey(outPrefix ?? ''), bytes, 'image/jpeg');
    pictures.push(bytes);
  }
  database.close();
  return pictures;
}

/** The sheet through the app's own door: rights, rows, store and paper. @throws when a photo is missing in it */
async function fetchSheet({ url }: App, count: number): Promise<void> {
  const answer = await fetch(`${url}/api/builds/${ORDER}/as-built/pdf`, {
    headers: { cookie: COOKIE, connection: 'close' },
  });
  const pdf = Buffer.from(await answer.arrayBuffer());
  const held = pdf.toString('latin1').split('/Subtype /Image').length - 1;
  if (!answer.ok || held !== count) throw new Error(`The sheet answered ${answer.status} with ${held} photos.`);
}

/** The same pictures laid into a file by the same library, and nothing else. */
function picturesAlone(pictures: Buffer[]): Promise<Buffer> {
  const shown = pictures.map((src, key) => createElement(Image, { key, src, style: { width: 164, height: 116 } }));
  return renderToBuffer(createElement(Document, null, createElement(Page, { size: 'A4' }, ...shown)));
}

async function measure(app: App, pictures: Buffer[]) {
  const rounds: { value: number; floor: number }[] = [];
  for (let round = -1; round < ROUNDS; round++) {
    const value = await secondsOf(() => fetchSheet(app, pictures.length));
    const floor = await secondsOf(() => picturesAlone(pictures));
    if (round >= 0) rounds.push({ value, floor });
  }
  return {
    value: median(rounds.map((round) => round.value)),
    floor: median(rounds.map((round) => round.floor)),
  };
}

/** The as-built PDF of a build with 60 entries and 200 photos, beside the library alone; and the app's memory beside rest. */
export const asBuiltPdf: Bench = {
  name: 'as-built-pdf',
  run: async () => {
    const app = await openApp(20, true);
    try {
      const pictures = await prepare(app);
      const rest = await peakMb(app.pid, () => pause(2000));
      const times: { value: number; floor: number }[] = [];
      const most = await peakMb(app.pid, async () => times.push(await measure(app, pictures)));
      const [time = { value: NaN, floor: NaN }] = times;
      return [
        valueBelow(5, { name: 'as-built-pdf', ...time, unit: 's' }),
        valueBelow(400, { name: 'as-built-memory', value: most, floor: rest, unit: 'MB' }),
      ];
    } finally {
      await app.stop();
    }
  },
};
