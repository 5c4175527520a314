import { createHash } from 'node:crypto';
import { setTimeout as pause } from 'node:timers/promises';
import { jpegWithExif } from '../support/photo-fixtures';
import { openApp, type App } from './app';
import { orderNumberOf, staffToken } from './fill';
import { peakMb } from './process-memory';
import { valueBelow, type Bench } from './row';

const PHOTOS = 12;

async function ask<Answer>({ url }: App, path: string, body: object): Promise<Answer> {
  const headers = {
    'Content-Type': 'application/json',
    Origin: url,
    // The second build's staff are the persons 2 to 4 (fill.ts).
    Cookie: `flitchbook-session=${staffToken(2)}`,
  };
  const answer = await fetch(`${url}${path}`, { method: 'POST', headers, body: JSON.stringify(body) });
  if (!answer.ok) throw new Error(`${path} answered ${answer.status}: ${await answer.text()}`);
  return answer.json();
}

/** As a phone does it: ask for room, send the bytes to the store, say that they are there. */
async function post(app: App, bytes: Buffer, name: string): Promise<void> {
  const promised = {
    uploadKey: `bench-${name}`,
    label: name,
    contentType: 'image/jpeg',
    sizeBytes: bytes.length,
    sha256: createHash('sha256').update(bytes).digest('base64'),
  };
  type Grant = { id: string; upload: { url: string; headers: Record<string, string> } };
  const { id, upload } = await ask<Grant>(app, `/api/builds/${orderNumberOf(1)}/photos`, promised);
  const sent = await fetch(upload.url, { method: 'PUT', headers: upload.headers, body: new Uint8Array(bytes) });
  if (!sent.ok) throw new Error(`The store answered ${sent.status}: ${await sent.text()}`);
  const { state } = await ask<{ state: string }>(app, `/api/photos/${id}`, {});
  if (state !== 'ready') throw new Error(`A photo came out ${state}.`);
}

/** Twelve different photos of 24 megapixels through the app's own doors, all at once, beside the same app at rest. */
export const photoMemory: Bench = {
  name: 'photo-memory',
  run: async () => {
    const photos: Buffer[] = [];
    for (let seed = 0; seed < PHOTOS; seed++)
      photos.push(await jpegWithExif({ widthPx: 6000, heightPx: 4000, orientation: 6, gps: true, seed }));
    const app = await openApp(20, true);
    try {
      const floor = await peakMb(app.pid, () => pause(2000));
      const arrive = () => Promise.all(photos.map((bytes, index) => post(app, bytes, `photo-${index}.jpg`)));
      const value = await peakMb(app.pid, arrive);
      return [valueBelow(700, { name: 'photo-memory', value, floor, unit: 'MB' })];
    } finally {
      await app.stop();
    }
  },
};
