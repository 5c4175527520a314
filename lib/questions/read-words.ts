import { firstName } from './people-words';

export type Reader = { id: string; name: string; side: 'client' | 'shop'; readAt: number };
type Written = { side: 'client' | 'shop'; writtenAt: number };

/**
 * Who of the other side has seen the newest letter: their first name and the moment, the first reader first. It is told of
 * the newest only, since what is kept is when each person first saw that.
 */
export function readersOf(letter: Written, readers: readonly Reader[]): { name: string; readAt: number }[] {
  return readers
    .filter(({ side, readAt }) => side !== letter.side && readAt >= letter.writtenAt)
    .map(({ name, readAt }) => ({ name: firstName(name), readAt }));
}
