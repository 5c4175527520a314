import type { CheckMark } from '@/lib/validation/checks';

export type LineToMark = { text: string; photoNeeded: boolean; mark: CheckMark | null; photoId: string | null };

/** Passed when nothing fails; what does not apply counts for nothing. */
export const endOf = (lines: Pick<LineToMark, 'mark'>[]): 'passed' | 'failed' =>
  lines.some(({ mark }) => mark === 'fail') ? 'failed' : 'passed';

/** A photo is asked for where a line was looked at; a line that does not apply needs none. */
export const lacksPhoto = ({ photoNeeded, mark, photoId }: Omit<LineToMark, 'text'>) =>
  photoNeeded && photoId === null && (mark === 'pass' || mark === 'fail');

/** What keeps a list from being finished, a sentence a field, or null. */
export function problemsOf(
  lines: LineToMark[],
  end: { backToStageId: string | null; reason: string },
): Record<string, string> | null {
  const unmarked = lines.filter(({ mark }) => mark === null);
  if (lines.length === 0) return { lines: 'This list has no lines. Ask the admin to put some in.' };
  if (unmarked.length > 0)
    return { lines: `${countLines(unmarked.length)} still to be marked: “${unmarked[0]?.text}”.` };
  const bare = lines.find(lacksPhoto);
  if (bare) return { lines: `A photo is asked for at “${bare.text}”. Take one.` };
  if (endOf(lines) === 'passed') return null;
  const problems = {
    ...(end.backToStageId ? {} : { backToStageId: 'Choose the stage it goes back to.' }),
    ...(end.reason ? {} : { reason: 'Say why it goes back, so that the next hands know.' }),
  };
  return Object.keys(problems).length > 0 ? problems : null;
}

const countLines = (count: number) => (count === 1 ? 'One line is' : `${count} lines are`);
