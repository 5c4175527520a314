import type { LookItem, MeasureItem, SpecDocument, SpecItem } from './document';
import { allowedWords, type MaterialNames } from './item-words';
import { signedWords } from './signed-words';
import { toleranceText } from './tolerance';
import { colourVerdict, MixedIlluminants } from '@/lib/craft/colour-difference';
import { verdict, type Measure } from '@/lib/craft/measure';
import { asTyped } from '@/lib/craft/typed-form';
import type { ColourReading, ReadingValue } from '@/lib/readings/reading';

/** An entry of the diary that shows an item, with one of its photos. */
export type ProofEntry = {
  entryId: string;
  datedAt: number;
  stageName: string;
  authorName: string;
  photoId: string | null;
  /** The owner reads it: published, and meant for them. */
  isForOwner: boolean;
};

export type LinkedEntry = ProofEntry & { itemKey: string };
export type TakenReading = LinkedEntry & { value: ReadingValue };

/** What an owner signed to let pass, word for word. */
export type SignedConcession = {
  itemKey: string;
  signed: string;
  measured: string;
  reason: string;
  signedName: string;
  signedAt: number;
};

/** Everything that decides what is proven; `readings` oldest first. */
export type ProofGround = {
  readings: TakenReading[];
  links: LinkedEntry[];
  concessions: SignedConcession[];
  openSignOffs: { title: string; itemKey: string | null; documentId: string | null }[];
  documents: { id: string; title: string; isSigned: boolean }[];
  materials: MaterialNames;
};

export type ProofState = 'proven' | 'out_of_tolerance' | 'conceded' | 'open';

export type ProofLine = {
  item: SpecItem;
  state: ProofState;
  /** As the owner signed it, in the unit it was signed in. */
  signed: string;
  measured: string | null;
  /** What is allowed, and once measured whether it is kept; a sentence where the reading cannot be compared. */
  withinWords: string | null;
  /** Newest first. */
  proofs: ProofEntry[];
  /** What must be signed before this item can be proven or passed. */
  waitsForSignOff: string | null;
  concession: SignedConcession | null;
};

/** What a concession quotes where nothing was measured. */
export const WITHOUT_PROOF = 'without proof';

/** Each item of a signed version beside what shows that it was built so, in the version's order. */
export function proofLines(document: SpecDocument, ground: ProofGround): ProofLine[] {
  const readings = byItem(ground.readings);
  const links = byItem(ground.links);
  const concessions = byItem(ground.concessions);
  return document.items.map((item) => {
    const taken = readings.get(item.key) ?? [];
    const proofs = entriesOf([...taken, ...(links.get(item.key) ?? [])]);
    const found = judge(item, taken, proofs.length > 0);
    const signed = signedWords(item, ground.materials);
    const unsigned = unsignedDocument(item, ground);
    const state = found.state === 'proven' && unsigned !== null ? 'open' : found.state;
    const words = concededWords({ item, signed, measured: found.measured });
    const concession = concessions.get(item.key)?.findLast(covering(words)) ?? null;
    return {
      ...found,
      item,
      signed,
      state: state !== 'proven' && concession ? 'conceded' : state,
      proofs,
      waitsForSignOff: unsigned ?? openTitle(item, ground),
      concession: state === 'proven' ? null : concession,
    };
  });
}

/** The lines that are neither proven nor let pass. */
export const openLines = (lines: ProofLine[]) =>
  lines.filter(({ state }) => state === 'open' || state === 'out_of_tolerance');

function byItem<T extends { itemKey: string }>(rows: T[]): Map<string, T[]> {
  const found = new Map<string, T[]>();
  for (const row of rows) {
    const group = found.get(row.itemKey);
    if (group) group.push(row);
    else found.set(row.itemKey, [row]);
  }
  return found;
}

/** What a concession says of an item, word for word: as it was signed with what is allowed, and as it came out. */
export function concededWords({ item, signed, measured }: Pick<ProofLine, 'item' | 'signed' | 'measured'>) {
  return { signed: [signed, allowedWords(item)].filter(Boolean).join(', '), measured: measured ?? WITHOUT_PROOF };
}

/** A concession lets pass what was measured when it was signed, against what was signed then; not what came later. */
const covering = (words: ReturnType<typeof concededWords>) => (concession: SignedConcession) =>
  concession.signed === words.signed && concession.measured === words.measured;

type Found = Pick<ProofLine, 'state' | 'measured' | 'withinWords'>;

function judge(item: SpecItem, taken: TakenReading[], isShown: boolean): Found {
  if (item.kind === 'measure') return judgeMeasure(item, lastOf(taken, measureOf), isShown);
  if (item.kind === 'look' && item.colour)
    return judgeColour({ ...item, colour: item.colour }, lastOf(taken, colourOf));
  return { state: isShown ? 'proven' : 'open', measured: null, withinWords: null };
}

function judgeMeasure(item: MeasureItem, measured: Measure | null, isShown: boolean): Found {
  const words = measured && asTyped(measured);
  if (!item.tolerance) return { state: isShown ? 'proven' : 'open', measured: words, withinWords: null };
  if (!measured) return { state: 'open', measured: null, withinWords: allowedWords(item) };
  const found = verdict(measured, item.aim, toleranceText(item.tolerance));
  if (!found.ok) return { state: 'open', measured: words, withinWords: found.message };
  return {
    state: found.standing === 'within' ? 'proven' : 'out_of_tolerance',
    measured: words,
    withinWords: found.words,
  };
}

function judgeColour(item: LookItem & { colour: NonNullable<LookItem['colour']> }, read: ColourReading | null): Found {
  if (!read) return { state: 'open', measured: null, withinWords: allowedWords(item) };
  try {
    const { deltaE, isWithin, words } = colourVerdict(item.colour, read, item.colour.limitDeltaE);
    const measured = `ΔE ${deltaE.toFixed(1)}`;
    const state = isWithin ? 'proven' : 'out_of_tolerance';
    return { state, measured, withinWords: words.slice(measured.length + 2) };
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    const measured = `L ${read.l}, a ${read.a}, b ${read.b}`;
    const sentence = error instanceof MixedIlluminants ? error.message : `Read the colour again. ${error.message}`;
    return { state: 'open', measured, withinWords: sentence };
  }
}

function lastOf<T>(taken: TakenReading[], pick: (value: ReadingValue) => T | null): T | null {
  for (const { value } of taken.toReversed()) {
    const found = pick(value);
    if (found !== null) return found;
  }
  return null;
}

/** What of a reading can stand beside a measure: the measure itself, a coat's dry film, a board's moisture. */
function measureOf(value: ReadingValue): Measure | null {
  if (value.kind === 'measure') return value.measured;
  if (value.kind === 'coat' && value.dryFilmUm !== null) return { text: String(value.dryFilmUm), unit: 'um' };
  if (value.kind === 'wood_room' && value.moisturePercent !== null)
    return { text: String(value.moisturePercent), unit: 'percent' };
  return null;
}

const colourOf = (value: ReadingValue) => (value.kind === 'colour' ? value : null);

function entriesOf(shown: LinkedEntry[]): ProofEntry[] {
  const byId = new Map<string, ProofEntry>();
  for (const { entryId, datedAt, stageName, authorName, photoId, isForOwner } of shown)
    byId.set(entryId, { entryId, datedAt, stageName, authorName, photoId, isForOwner });
  return [...byId.values()].sort((a, b) => b.datedAt - a.datedAt || b.entryId.localeCompare(a.entryId));
}

function unsignedDocument(item: SpecItem, { documents }: ProofGround): string | null {
  if (item.kind !== 'look' || item.documentId === null) return null;
  const document = documents.find(({ id }) => id === item.documentId);
  if (document?.isSigned) return null;
  return document?.title ?? 'its drawing or sample';
}

function openTitle(item: SpecItem, { openSignOffs }: ProofGround): string | null {
  const ofItem = openSignOffs.find(
    ({ itemKey, documentId }) =>
      itemKey === item.key || (item.kind === 'look' && documentId !== null && documentId === item.documentId),
  );
  return ofItem?.title ?? null;
}
