import { whenWords } from './due-words';

export type AwaitedAnswer = {
  subject: string;
  askerName: string;
  /** Who holds the pen; null when nobody on the build can answer. */
  holderName: string | null;
  /** The reader holds it. */
  isReaders: boolean;
  dueAt: number | null;
};

function whose({ holderName, isReaders }: AwaitedAnswer): string {
  if (isReaders) return 'your answer';
  return holderName === null ? 'an answer' : `${holderName}’s answer`;
}

function due(dueAt: number | null, zone: string, nowMs: number): string {
  if (dueAt === null) return '';
  return `, due ${nowMs > dueAt ? 'since ' : ''}${whenWords(dueAt, zone, nowMs)}`;
}

/** Who waits for whom: "Ada Quill waits for Tomas Reed’s answer on “Neck shape”, due Monday 13:12". */
export function whoseAnswerWords(awaited: AwaitedAnswer, zone: string, nowMs: number): string {
  const nobody = awaited.holderName === null ? '; nobody on the build can give it' : '';
  const on = `on “${awaited.subject}”${due(awaited.dueAt, zone, nowMs)}`;
  return `${awaited.askerName} waits for ${whose(awaited)} ${on}${nobody}`;
}
