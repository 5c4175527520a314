import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Resend } from 'resend';
import { startMailRoom } from '@/lib/fakes/mail-room/server';

export const KEY = 're_local_example';

interface ListedMail {
  id: string;
  from: string;
  to: string[];
  subject: string;
  html: string | null;
  text: string | null;
  headers: Record<string, string>;
  attachments: { filename: string; contentType: string; sizeBytes: number }[];
  createdAt: string;
  idempotencyKey: string | null;
}

export interface TestMail {
  from: string;
  to: string;
  subject: string;
  text: string;
  html: string;
  cc?: string;
  headers?: Record<string, string>;
  attachments?: { filename: string; content: Buffer; contentType: string }[];
}

export function mailTo(to: string, change: Partial<TestMail> = {}): TestMail {
  return {
    from: 'Quillhaven <diary@quillhaven.example>',
    to,
    subject: 'Your top is glued',
    text: 'Read it: https://diary.example/builds/Q-2417',
    html: '<html><head></head><body><a href="https://diary.example/builds/Q-2417">Read it</a></body></html>',
    ...change,
  };
}

export async function startTestRoom(now: () => number = Date.now) {
  const dataDir = await mkdtemp(join(tmpdir(), 'mails-'));
  let room = await startMailRoom({ port: 0, dataDir, apiKey: KEY, now });
  return {
    dataDir,
    get url() {
      return room.url;
    },
    resend: () => new Resend(KEY, { baseUrl: room.url }),
    restart: async () => {
      await room.close();
      room = await startMailRoom({ port: 0, dataDir, apiKey: KEY, now });
    },
    mails: async (to: string): Promise<ListedMail[]> =>
      (await fetch(`${room.url}/mails?to=${encodeURIComponent(to)}`)).json(),
    fail: (fault: object) => fetch(`${room.url}/_fail`, { method: 'POST', body: JSON.stringify(fault) }),
    page: async (path: string) => (await fetch(`${room.url}${path}`)).text(),
    stop: async () => {
      await room.close();
      await rm(dataDir, { recursive: true, force: true });
    },
  };
}
