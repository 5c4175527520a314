import type { FrozenMail } from '@/lib/mail/kinds';
import type { MailAttachment } from '@/lib/mail/send-mail';
import { readObject } from '@/lib/storage';

/** One photo of a build is in the digests of all who follow it: the last few stay at hand, at most 60 kB each. */
const KEPT = 200;
const kept = new Map<string, Promise<Buffer>>();

function readPhoto(key: string): Promise<Buffer> {
  const known = kept.get(key);
  if (known) return known;
  const read = readObject(key);
  kept.set(key, read);
  read.catch(() => kept.delete(key));
  const [oldest] = kept.keys();
  if (kept.size > KEPT && oldest !== undefined) kept.delete(oldest);
  return read;
}

/** A mail's photos as inline attachments. What lies under a key never changes. @throws Error when the store has none */
export function attachPhotos({ photos }: Pick<FrozenMail, 'photos'>): Promise<MailAttachment[]> {
  return Promise.all(
    photos.map(async ({ key, contentId }) => ({
      filename: `${contentId}.jpg`,
      content: await readPhoto(key),
      contentType: 'image/jpeg',
      contentId,
    })),
  );
}
