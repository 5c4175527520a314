import { doubtSequence, doubtWetSanding, findAbrasive, splitGrades } from '../craft/abrasives';
import type { Work } from '../work';
import type { AbrasiveReading, ShownReading } from './reading';
import { fieldDoubts, nothingRead, worstOf, type PartRead } from './typed';

/** Papers as typed, in the order they were used; before the wheel they are asked to be fine enough. */
export function readPapers(text: string, work: Work): PartRead {
  const typed = splitGrades(text);
  if (typed.length === 0) return nothingRead;
  const odd = work === 'buffing' ? doubtWetSanding(typed) : doubtSequence(typed);
  const doubts = fieldDoubts({ papers: worstOf(odd) });
  const grades = typed.flatMap((grade) => findAbrasive(grade)?.grade ?? []);
  if (doubts.papers?.kind === 'wrong' || grades.length < typed.length)
    return { reading: null, shown: null, doubts, missing: {} };
  const value: AbrasiveReading = { kind: 'abrasives', grades };
  return { reading: { value, itemKey: null }, shown: showPapers(value), doubts, missing: {} };
}

/** Why papers cannot be meant, or null. */
export function papersTrouble({ grades }: AbrasiveReading): string | null {
  const unknown = grades.find((grade) => !findAbrasive(grade));
  if (unknown !== undefined) return `"${unknown}" is no paper we know. Write the grade with its P, such as P320.`;
  return doubtSequence(grades).find(({ kind }) => kind === 'wrong')?.sentence ?? null;
}

export function showPapers({ grades }: AbrasiveReading): ShownReading {
  const last = findAbrasive(grades.at(-1) ?? '');
  return {
    kind: 'abrasives',
    label: 'Papers',
    figures: grades.join(', '),
    words: last ? `down to grains of ${last.medianGrainSizeUm} µm` : '',
    standing: null,
    bar: null,
  };
}
