'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useState, type FormEvent } from 'react';
import { RefusedNotice } from './refused-notice';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Button } from '@/components/ui/button';
import { sendJson, type Refused } from '@/lib/send-json';
import { readNote } from '@/lib/rich-text/read';
import { plainNote } from '@/lib/rich-text/plain-text';

type FreshLetterProps = { questionId: string; letterId: string; body: unknown; untilMs: number; clock: string };

/** The writer's own letter while it waits to be mailed: correct it, or let it go now. */
export function FreshLetter({ questionId, letterId, body, untilMs, clock }: FreshLetterProps) {
  const router = useRouter();
  const [isOpen, setIsOpen] = useState(false);
  const [note, setNote] = useState(() => readNote(body) ?? plainNote(''));
  const [refused, setRefused] = useState<Refused | null>(null);
  const [isBusy, setIsBusy] = useState(false);

  useEffect(() => {
    if (isOpen) return;
    const over = setTimeout(() => router.refresh(), Math.max(0, untilMs - Date.now()) + 500);
    return () => clearTimeout(over);
  }, [isOpen, untilMs, router]);

  async function send(path: string, part: object) {
    setIsBusy(true);
    const door = `/api/questions/${questionId}/letters/${letterId}${path}`;
    const sent = await sendJson(door, { idempotencyKey: crypto.randomUUID(), ...part });
    setIsBusy(false);
    setRefused(sent.ok ? null : sent.refused);
    if (!sent.ok) return;
    setIsOpen(false);
    router.refresh();
  }

  function save(event: FormEvent) {
    event.preventDefault();
    void send('', { note });
  }

  if (!isOpen) {
    return (
      <div className="grid gap-2">
        <p className="flex flex-wrap items-center gap-x-5 text-sm text-soft">
          <span>Goes out by mail at {clock}.</span>
          <LineButton isBusy={isBusy} onPress={() => setIsOpen(true)}>
            Correct it
          </LineButton>
          <LineButton isBusy={isBusy} onPress={() => void send('/send', {})}>
            Send it now
          </LineButton>
        </p>
        <RefusedNotice refused={refused} shown={[]} />
      </div>
    );
  }
  return (
    <form onSubmit={save} className="grid gap-3">
      <LazyNoteEditor
        initial={note}
        label={`Your letter, which goes out at ${clock}`}
        onChange={setNote}
        disabled={isBusy}
        invalid={refused?.fields.note}
      />
      <RefusedNotice refused={refused} shown={['note']} />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" disabled={isBusy} className="min-h-11">
          Save the correction
        </Button>
        <Button variant="quiet" disabled={isBusy} onClick={() => setIsOpen(false)} className="min-h-11">
          Leave it as it is
        </Button>
      </div>
    </form>
  );
}

function LineButton({ isBusy, onPress, children }: { isBusy: boolean; onPress: () => void; children: string }) {
  return (
    <button
      type="button"
      disabled={isBusy}
      onClick={onPress}
      className="min-h-11 font-semibold text-finish-deep hover:underline disabled:opacity-55 md:min-h-8"
    >
      {children}
    </button>
  );
}
