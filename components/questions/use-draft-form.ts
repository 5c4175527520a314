'use client';

import { useEffect, useState, useSyncExternalStore } from 'react';
import { keepDraft, newDraft, readDraft, type Draft } from './draft';
import { sendJson, type Refused, type Sendable } from '@/lib/send-json';

const neverChanges = () => () => undefined;

/**
 * False in the server's markup and while it comes alive, true from then on. A form that begins with what this tab
 * keeps is mounted anew at that moment.
 */
export const useIsBrowser = () =>
  useSyncExternalStore(
    neverChanges,
    () => true,
    () => false,
  );

/**
 * A form that is sent as JSON and loses nothing: what is typed is kept in this tab under `name` until it has arrived.
 * `send` gives the door's answer, or null after it has put the reason into `refused`.
 */
export function useDraftForm(name: string, isBrowser: boolean) {
  const [draft, setDraft] = useState<Draft>(() => (isBrowser && readDraft(name)) || newDraft());
  const [refused, setRefused] = useState<Refused | null>(null);
  const [isSending, setIsSending] = useState(false);

  useEffect(() => {
    if (isBrowser) keepDraft(name, draft);
  }, [isBrowser, name, draft]);

  async function send(url: string, body: Sendable): Promise<unknown> {
    setIsSending(true);
    const sent = await sendJson(url, body);
    setIsSending(false);
    setRefused(sent.ok ? null : sent.refused);
    if (!sent.ok) return null;
    setDraft(newDraft());
    return sent.answer;
  }

  const change = (part: Partial<Draft>) => setDraft((current) => ({ ...current, ...part }));
  return { draft, change, send, refused, isSending };
}
