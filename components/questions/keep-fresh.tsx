'use client';

import { useRouter } from 'next/navigation';
import useSWR from 'swr';
import { wordIn } from '@/lib/send-json';

const LOOK_EVERY_MS = 15_000;

/**
 * Brings a new letter onto an open page without touching what is being typed. It asks for the question's mark first and
 * loads the page anew only when that has changed: loading it with no signal would leave the page for the browser's own
 * error.
 */
export function KeepFresh({ questionId, mark }: { questionId: string; mark: string }) {
  const router = useRouter();
  useSWR<string | null, Error>(`/api/questions/${questionId}/letters`, fetchMark, {
    refreshInterval: LOOK_EVERY_MS,
    focusThrottleInterval: 1000,
    dedupingInterval: 1000,
    onSuccess: (found) => {
      if (found !== mark) router.refresh();
    },
  });
  return null;
}

/** @returns null when the question can no longer be read. @throws Error when there is no answer */
async function fetchMark(url: string): Promise<string | null> {
  const answer = await fetch(url, { cache: 'no-store' });
  if (answer.status === 401) window.location.assign('/sign-in');
  if (answer.status === 404) return null;
  if (!answer.ok) throw new Error(`the question answered ${answer.status}`);
  return wordIn(await answer.json(), 'mark');
}
