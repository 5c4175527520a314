import { ask, wrong, type Doubt } from './doubt';

export type PGrade = `P${number}`;

export type Abrasive = {
  grade: PGrade;
  /** Median grain size (ds50) in micrometres. */
  medianGrainSizeUm: number;
  /** The nearest grade of the US scale, where a table gives one. */
  nearestUsGrade: number | null;
};

/**
 * The FEPA P-grades, coarse to fine: ISO 6344-2 (macrogrits, to P220) and ISO 6344-3 (microgrits, from P240). Sizes as two
 * public tables give them, which agree. US grades from three public comparison charts.
 */
export const abrasives: readonly Abrasive[] = [
  { grade: 'P12', medianGrainSizeUm: 1815, nearestUsGrade: null },
  { grade: 'P16', medianGrainSizeUm: 1324, nearestUsGrade: null },
  { grade: 'P20', medianGrainSizeUm: 1000, nearestUsGrade: null },
  { grade: 'P24', medianGrainSizeUm: 764, nearestUsGrade: null },
  { grade: 'P30', medianGrainSizeUm: 642, nearestUsGrade: null },
  { grade: 'P36', medianGrainSizeUm: 538, nearestUsGrade: null },
  { grade: 'P40', medianGrainSizeUm: 425, nearestUsGrade: null },
  { grade: 'P50', medianGrainSizeUm: 336, nearestUsGrade: null },
  { grade: 'P60', medianGrainSizeUm: 269, nearestUsGrade: null },
  { grade: 'P80', medianGrainSizeUm: 201, nearestUsGrade: null },
  { grade: 'P100', medianGrainSizeUm: 162, nearestUsGrade: null },
  { grade: 'P120', medianGrainSizeUm: 125, nearestUsGrade: null },
  { grade: 'P150', medianGrainSizeUm: 100, nearestUsGrade: null },
  { grade: 'P180', medianGrainSizeUm: 82, nearestUsGrade: 180 },
  { grade: 'P220', medianGrainSizeUm: 68, nearestUsGrade: null },
  { grade: 'P240', medianGrainSizeUm: 58.5, nearestUsGrade: null },
  { grade: 'P280', medianGrainSizeUm: 52.2, nearestUsGrade: null },
  { grade: 'P320', medianGrainSizeUm: 46.2, nearestUsGrade: null },
  { grade: 'P360', medianGrainSizeUm: 40.5, nearestUsGrade: null },
  { grade: 'P400', medianGrainSizeUm: 35, nearestUsGrade: 320 },
  { grade: 'P500', medianGrainSizeUm: 30.2, nearestUsGrade: null },
  { grade: 'P600', medianGrainSizeUm: 25.8, nearestUsGrade: null },
  { grade: 'P800', medianGrainSizeUm: 21.8, nearestUsGrade: 400 },
  { grade: 'P1000', medianGrainSizeUm: 18.3, nearestUsGrade: 500 },
  { grade: 'P1200', medianGrainSizeUm: 15.3, nearestUsGrade: 600 },
  { grade: 'P1500', medianGrainSizeUm: 12.6, nearestUsGrade: 800 },
  { grade: 'P2000', medianGrainSizeUm: 10.3, nearestUsGrade: 1000 },
  { grade: 'P2500', medianGrainSizeUm: 8.4, nearestUsGrade: null },
];

/** Wet sanding runs to this paper before polishing: common practice, no source. */
export const FINEST_BEFORE_POLISHING: PGrade = 'P1500';

/** How many grades a step may leave out: common practice, no source. */
const MOST_LEFT_OUT = 2;

/** The paper of that name, "P320" in any case; undefined when there is none. */
export const findAbrasive = (text: string) =>
  abrasives.find(({ grade }) => grade === text.trim().toUpperCase().replace(/\s/g, ''));

const isFiner = (a: Abrasive, b: Abrasive) => abrasives.indexOf(a) > abrasives.indexOf(b);

/** Papers as typed, "P320, P400 p600", in the order given. */
export const splitGrades = (text: string) =>
  text
    .replace(/\bp\s+(?=\d)/gi, 'P')
    .split(/[\s,;>]+/)
    .filter((part) => part !== '');

/** What is odd about one paper as typed: the same number names different papers on the P and the US or Japanese scale. */
export function doubtGrade(text: string): Doubt | null {
  if (findAbrasive(text)) return null;
  const typed = text.trim();
  if (!/^\d+$/.test(typed)) return wrong(`"${typed}" is no paper we know. Write the grade with its P, such as P320.`);
  const withP = findAbrasive(`P${typed}`);
  const byUs = abrasives.find(({ nearestUsGrade }) => nearestUsGrade === Number(typed));
  const readings = [
    withP && `${withP.grade} (${withP.medianGrainSizeUm} µm)`,
    byUs && byUs !== withP && `${byUs.grade} if it is on the US scale`,
  ].filter(Boolean);
  if (readings.length === 0) return wrong(`There is no paper ${typed}. Write the grade with its P, such as P320.`);
  return ask(`Is ${typed} a P-grade? Without the P it may be another paper. Write ${readings.join(', or ')}.`);
}

/** What is odd about papers used one after another: each must be finer than the one before, without too wide a jump. */
export function doubtSequence(grades: string[]): Doubt[] {
  const unknown = grades.map(doubtGrade).filter((doubt) => doubt !== null);
  if (unknown.length > 0) return unknown;
  const papers = grades.map(findAbrasive).filter((paper) => paper !== undefined);
  return papers.slice(1).flatMap((paper, index) => {
    const before = papers[index];
    if (!before) return [];
    if (!isFiner(paper, before)) {
      return [wrong(`${paper.grade} after ${before.grade} is not finer. Put the papers in the order they were used.`)];
    }
    const between = suggestSequence(before.grade, paper.grade).slice(1, -1);
    if (abrasives.indexOf(paper) - abrasives.indexOf(before) - 1 <= MOST_LEFT_OUT) return [];
    const size = `${before.medianGrainSizeUm} to ${paper.medianGrainSizeUm} µm`;
    return [
      ask(`${before.grade} to ${paper.grade} is a wide jump (${size}). Usual papers between: ${between.join(', ')}.`),
    ];
  });
}

/** As `doubtSequence`, and asks when the papers end before polishing can begin. */
export function doubtWetSanding(grades: string[]): Doubt[] {
  const doubts = doubtSequence(grades);
  const last = findAbrasive(grades.at(-1) ?? '');
  const enough = findAbrasive(FINEST_BEFORE_POLISHING);
  if (!last || !enough || last === enough || isFiner(last, enough)) return doubts;
  return [...doubts, ask(`Wet sanding usually runs to ${enough.grade} before polishing; this ends at ${last.grade}.`)];
}

/**
 * Papers from one grade to another, both included: every other grade, which removes the scratches of the one before. Common
 * practice, no source.
 * @throws RangeError when `to` is not finer than `from` or one of them is no P-grade
 */
export function suggestSequence(from: string, to: string): PGrade[] {
  const first = abrasives.findIndex(({ grade }) => grade === findAbrasive(from)?.grade);
  const last = abrasives.findIndex(({ grade }) => grade === findAbrasive(to)?.grade);
  if (first < 0 || last < 0 || last <= first) {
    throw new RangeError(`Papers run from a coarse to a finer P-grade; got ${from} to ${to}.`);
  }
  return abrasives
    .filter((_, i) => i === last || (i >= first && i < last && (i - first) % 2 === 0))
    .map((a) => a.grade);
}
