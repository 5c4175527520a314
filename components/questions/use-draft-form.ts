'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { keepDraft, newDraft, readDraft, type Draft } from './draft';
import { arrived, useLetterPhotos } from './use-letter-photos';
import { sendJson, type Refused, type Sendable } from '@/lib/send-json';

const neverChanges = () => () => undefined;

/**
 * False in the server's markup and while it comes alive, true from then on. A form that begins with what this device
 * keeps is mounted anew at that moment.
 */
export const useIsBrowser = () =>
  useSyncExternalStore(
    neverChanges,
    () => true,
    () => false,
  );

type DraftOf = {
  /** Under which this device keeps what is typed. */
  name: string;
  /** The build that photos are sent to. */
  orderNumber: string;
  isBrowser: boolean;
};

const PHOTOS_UNDER_WAY: Refused = {
  status: 0,
  message: '',
  fields: { photos: 'Not every photo has arrived yet. Wait for it, or take it out, then send.' },
};

/**
 * A form that is sent as JSON and loses nothing: what is typed is kept on this device until it has arrived. `send` gives
 * the door's answer, or null after it has put the reason into `refused`.
 */
export function useDraftForm({ name, orderNumber, isBrowser }: DraftOf) {
  const [draft, setDraft] = useState<Draft>(() => (isBrowser && readDraft(name)) || newDraft());
  const [refused, setRefused] = useState<Refused | null>(null);
  const [isSending, setIsSending] = useState(false);
  const photos = useLetterPhotos(orderNumber, draft.photos);
  const { list } = photos;

  useEffect(() => {
    if (isBrowser) keepDraft(name, { ...draft, photos: arrived(list) });
  }, [isBrowser, name, draft, list]);

  /** The photos as the door takes them; null while one is under way. */
  function photosToSend(): { id: string; alt: string }[] | null {
    const ready = arrived(list);
    if (ready.length < list.length) setRefused(PHOTOS_UNDER_WAY);
    return ready.length < list.length ? null : ready.map(({ photoId, alt }) => ({ id: photoId, alt }));
  }

  async function send(url: string, body: Sendable): Promise<unknown> {
    setIsSending(true);
    const sent = await sendJson(url, body);
    setIsSending(false);
    setRefused(sent.ok ? null : sent.refused);
    if (!sent.ok) return null;
    setDraft(newDraft());
    photos.clear();
    return sent.answer;
  }

  const change = (part: Partial<Draft>) => setDraft((current) => ({ ...current, ...part }));
  // Until the page is alive nothing typed would be kept: the fields wait for that moment.
  return { draft, change, photos, photosToSend, send, refused, isSending, isLocked: isSending || !isBrowser };
}
