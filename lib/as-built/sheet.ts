import { caution, cautionsForMaterials, type Caution } from '@/lib/craft/cautions';
import { fingerboard, type Fingerboard } from '@/lib/craft/fingerboard';
import { PAPERS_SENTENCE } from '@/lib/craft/materials';
import { figuresOf } from '@/lib/craft/typed-form';
import { dayWords } from '@/lib/date-words';
import { leavingWords } from '@/lib/leaving-words';
import { boardOf } from '@/lib/specs/board';
import type { SpecItem } from '@/lib/specs/document';
import { drawingOf, nameDrawings, type Drawing, type SentUp } from '@/lib/specs/drawings';
import { byGroup, groupName } from '@/lib/specs/groups';
import { allowedWords } from '@/lib/specs/item-words';
import type { ProofEntry, ProofLine, ProofState } from '@/lib/specs/proof';

/** A photo of the diary; `jpegKey` is where its small JPEG lies in the object store. */
export type AsBuiltPhoto = {
  id: string;
  entryId: string;
  jpegKey: string;
  alt: string;
  widthPx: number;
  heightPx: number;
  datedAt: number;
  stageName: string;
};

/** A line of the set-up sheet as it was taken last. */
export type SetUpTaken = {
  key: string;
  label: string;
  figures: string;
  words: string;
  datedAt: number;
  authorName: string;
};

/** What the sheet is made of, as the viewer may read it. */
export type AsBuiltFacts = {
  shopName: string;
  orderNumber: string;
  instrument: string;
  finishName: string;
  finishHex: string;
  ownerName: string | null;
  readyAt: number | null;
  shippedAt: number | null;
  shippedBy: string | null;
  deliveredAt: number | null;
  version: { number: number; signedAt: number; signedName: string };
  lines: ProofLine[];
  /** Drawings and samples that the viewer may open. */
  drawings: SentUp[];
  setUp: SetUpTaken[];
  /** Materials of the spec that are marked: their papers are asked about. */
  papers: string[];
  /** Oldest first. */
  photos: AsBuiltPhoto[];
};

export type AsBuiltRow = {
  key: string;
  label: string;
  signed: string;
  allowed: string | null;
  drawing: Drawing | null;
  measured: string | null;
  within: string | null;
  state: ProofState;
  stateWords: string;
  /** "29 September, Colour & clear, Bo Lindgren" */
  proof: string | null;
  entryId: string | null;
  photoId: string | null;
};

export type ConcededRow = { key: string; label: string; signed: string; measured: string; reason: string; by: string };

/** The as-built sheet in words, the same for the screen and for paper. */
export type AsBuiltSheet = {
  shopName: string;
  orderNumber: string;
  instrument: string;
  finishHex: string;
  facts: string[];
  version: string;
  /** Where the build has got to; whether anything is still open. */
  standing: string;
  isWhole: boolean;
  board: Fingerboard | null;
  groups: { key: string; name: string; rows: AsBuiltRow[] }[];
  setUp: { key: string; label: string; figures: string; words: string; by: string }[];
  setUpCautions: Caution[];
  concessions: ConcededRow[];
  papers: string[];
  papersSentence: string;
  papersCautions: Caution[];
  photos: (AsBuiltPhoto & { number: number; caption: string })[];
};

const stateWords: Record<ProofState, string> = {
  proven: 'proven',
  out_of_tolerance: 'out of tolerance',
  conceded: 'let pass by the owner',
  open: 'without proof',
};

/** Sets the facts in words, dates in the reader's zone. */
export function asBuiltSheet(facts: AsBuiltFacts, zone: string, nowMs: number): AsBuiltSheet {
  const day = (ms: number) => dayWords(ms, zone, nowMs);
  const { version, lines, papers } = facts;
  const drawings = nameDrawings(facts.drawings, zone);
  const items = lines.map(({ item }) => item);
  return {
    shopName: facts.shopName,
    orderNumber: facts.orderNumber,
    instrument: facts.instrument,
    finishHex: facts.finishHex,
    facts: [facts.finishName, facts.ownerName && `built for ${facts.ownerName}`].filter((fact) => fact !== null),
    version: `Version ${version.number}, signed by ${version.signedName} on ${day(version.signedAt)}`,
    standing: leavingWords(facts, day) ?? 'Still being built: what has no proof yet stands here as not yet',
    isWhole: lines.every(({ state }) => state === 'proven' || state === 'conceded'),
    board: boardIn(items),
    groups: byGroup(items).map(({ group, items: ofGroup }) => ({
      key: group,
      name: groupName(group),
      rows: lines.filter(({ item }) => ofGroup.includes(item)).map((line) => rowOf(line, drawings, day)),
    })),
    setUp: facts.setUp.map(({ datedAt, authorName, ...taken }) => ({ ...taken, by: `${day(datedAt)}, ${authorName}` })),
    setUpCautions: [caution('string_change'), caution('truss_rod')],
    concessions: lines.flatMap((line) => concededRow(line, day)),
    papers,
    papersSentence: PAPERS_SENTENCE,
    papersCautions: cautionsForMaterials(papers.map(() => ({ papersMayBeNeeded: true }))),
    photos: facts.photos.map((photo, index) => ({
      ...photo,
      number: index + 1,
      caption: `${day(photo.datedAt)}, ${photo.stageName}`,
    })),
  };
}

function boardIn(items: SpecItem[]): Fingerboard | null {
  const plan = boardOf({ items });
  if (!plan.ok) return null;
  const drawn = fingerboard(plan.value);
  return drawn.ok ? drawn.board : null;
}

function rowOf(line: ProofLine, drawings: readonly Drawing[], day: (ms: number) => string): AsBuiltRow {
  const { item, signed, measured, withinWords, state, proofs, waitsForSignOff } = line;
  const [shown] = proofs;
  return {
    key: item.key,
    label: item.label,
    signed: figuresIn(signed, item),
    allowed: allowedWords(item),
    drawing: drawingOf(item, drawings),
    measured: measured && figuresIn(measured, item),
    within: withinWords,
    state,
    stateWords: state === 'open' && waitsForSignOff !== null ? `waits for “${waitsForSignOff}”` : stateWords[state],
    proof: shown ? proofWords(shown, day) : null,
    entryId: shown?.entryId ?? null,
    photoId: proofs.find(({ photoId }) => photoId !== null)?.photoId ?? null,
  };
}

/** A length of the sheet in both unit systems: nobody switches units on paper. */
const figuresIn = (words: string, item: SpecItem) =>
  item.kind === 'measure' ? figuresOf({ text: words, unit: item.aim.unit }) : words;

const proofWords = ({ datedAt, stageName, authorName }: ProofEntry, day: (ms: number) => string) =>
  `${day(datedAt)}, ${stageName}, ${authorName}`;

function concededRow({ item, concession }: ProofLine, day: (ms: number) => string): ConcededRow[] {
  if (!concession) return [];
  const { signed, measured, reason, signedName, signedAt } = concession;
  const by = `Signed by ${signedName} on ${day(signedAt)}`;
  return [{ key: item.key, label: item.label, signed, measured, reason, by }];
}
