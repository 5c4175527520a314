import { windowWords, type SaidWindow } from '../schedule/window-words';

/** A window as it is kept. */
export type KeptWindow = {
  kind: 'window' | 'waiting' | 'unsayable';
  earliestOn: string | null;
  latestOn: string | null;
  words: string | null;
};

function saidWindow({ kind, earliestOn, latestOn, words }: KeptWindow): SaidWindow {
  if (kind === 'unsayable' || earliestOn === null || latestOn === null)
    return { kind: 'unsayable', why: words ?? 'No date can be given yet.' };
  if (kind === 'waiting') return { kind, onWhat: words ?? 'something', earliestOn, latestOn };
  return { kind, earliestOn, latestOn };
}

/** "between 20 October and 6 November, 8 in 10"; null where there is no date. */
export function readyWords(kept: KeptWindow, today: string, locale?: string): string | null {
  const said = saidWindow(kept);
  return said.kind === 'unsayable' ? null : windowWords(said, today, locale);
}

/** "Ready between 20 October and 6 November, 8 in 10.", or the sentence that says why there is no date. */
export function readySentence(kept: KeptWindow, today: string): string {
  const said = saidWindow(kept);
  const words = windowWords(said, today);
  return said.kind === 'unsayable' ? words : `Ready ${words}.`;
}
