import { cutToPages } from './paper-pages';
import { paperText } from './paper-text';
import type { AsBuiltRow, AsBuiltSheet } from './sheet';
import type { Fingerboard } from '@/lib/craft/fingerboard';

/** A picture by its key in the store; null where the same picture stands on the paper already. */
type PlannedPicture = { number: number; key: string | null };

export type PlannedRow = {
  label: string;
  signed: string;
  allowed: string | null;
  measured: string | null;
  within: string | null;
  standing: string;
  isOff: boolean;
  proof: string;
  picture: PlannedPicture | null;
};
export type PlannedPrint = { number: number; key: string; caption: string; alt: string };

/** What stands on which page of the paper, every word ready to be set: plain data that can be handed to another thread. */
export type PaperPlan = {
  title: string;
  author: string;
  over: string;
  instrument: string;
  facts: string[];
  foot: string;
  board: Pick<Fingerboard, 'outline' | 'frets' | 'inlays' | 'bounds'> | null;
  pages: { name: string; rows: PlannedRow[] }[][];
  setUp: { label: string; figures: string; words: string; by: string }[];
  cautions: { title: string; text: string }[];
  concessions: { label: string; words: string; by: string }[];
  papers: string;
  papersSentence: string;
  photoCount: number;
  prints: PlannedPrint[][];
};

/** Points that the first page has left for rows, and what the drawn fingerboard takes up of them. */
const FIRST_PT = 610;
const BOARD_PT = 70;
const PRINTS_A_PAGE = 15;

/** Lays a sheet out. `hasPicture` says which objects of the store could be read: a photo without one is left out. */
export function planPaper(sheet: AsBuiltSheet, hasPicture: (jpegKey: string) => boolean): PaperPlan {
  const pictures = placePictures(sheet, hasPicture);
  const inRows = new Set([...pictures.values()].map(({ number }) => number));
  const others = sheet.photos.filter(({ number, jpegKey }) => !inRows.has(number) && hasPicture(jpegKey));
  const firstPt = sheet.board ? FIRST_PT - BOARD_PT : FIRST_PT;
  const cut = cutToPages(sheet.groups, firstPt, ({ key }) => Boolean(pictures.get(key)?.key));
  return {
    ...headOf(sheet),
    pages: cut.map((groups) =>
      groups.map(({ name, rows }) => ({ name, rows: rows.map((row) => rowOf(row, pictures.get(row.key) ?? null)) })),
    ),
    setUp: sheet.setUp.map(({ label, figures, words, by }) => ({
      label: paperText(label),
      figures: paperText(figures),
      words: paperText(words),
      by: paperText(by),
    })),
    cautions: sheet.setUpCautions.map(({ title, text }) => ({ title, text })),
    concessions: sheet.concessions.map(({ label, signed, measured, reason, by }) => ({
      label: paperText(label),
      words: paperText(`Signed: ${signed}. As it came out: ${measured}. ${reason}`),
      by: paperText(by),
    })),
    papers: paperText(sheet.papers.join(', ')),
    papersSentence: sheet.papersSentence,
    photoCount: others.length,
    prints: printPages(others),
  };
}

function headOf({ instrument, orderNumber, shopName, facts, version, standing, board }: AsBuiltSheet) {
  const shop = paperText(shopName);
  return {
    title: `${paperText(instrument)}, ${orderNumber}: as signed, as built`,
    author: shop,
    over: `${shop} · Order ${orderNumber}`,
    instrument: paperText(instrument),
    facts: [facts.join(' · '), version, standing].map(paperText),
    foot: `${orderNumber} · ${shop}`,
    board: board && { outline: board.outline, frets: board.frets, inlays: board.inlays, bounds: board.bounds },
  };
}

/** Each picture is laid in where it is used first; the rows after that name its number, so that paper carries it once. */
function placePictures(sheet: AsBuiltSheet, hasPicture: (jpegKey: string) => boolean): Map<string, PlannedPicture> {
  const byId = new Map(sheet.photos.map((photo) => [photo.id, photo]));
  const placed = new Map<string, PlannedPicture>();
  const used = new Set<string>();
  for (const { key, photoId } of sheet.groups.flatMap(({ rows }) => rows)) {
    const photo = photoId === null ? undefined : byId.get(photoId);
    if (!photo || !hasPicture(photo.jpegKey)) continue;
    placed.set(key, { number: photo.number, key: used.has(photo.id) ? null : photo.jpegKey });
    used.add(photo.id);
  }
  return placed;
}

function rowOf(row: AsBuiltRow, picture: PlannedPicture | null): PlannedRow {
  return {
    label: paperText(row.label),
    signed: paperText(row.signed),
    allowed: underSigned(row),
    measured: row.measured && paperText(row.measured),
    within: row.measured === null ? null : row.within && paperText(row.within),
    standing: paperText(row.stateWords),
    isOff: row.state === 'out_of_tolerance' || row.state === 'open',
    proof: row.proof === null ? 'not yet' : paperText(row.proof),
    picture,
  };
}

/** Below the signed value: what is allowed, and the drawing it was signed as. */
function underSigned({ allowed, drawing }: AsBuiltRow): string | null {
  const words = [allowed, drawing && `see “${drawing.name}”`].filter((word) => word !== null);
  return words.length === 0 ? null : paperText(words.join('; '));
}

/** Cut by hand: left to flow, the renderer would lay out all that follow once more for every page. */
function printPages(photos: AsBuiltSheet['photos']): PlannedPrint[][] {
  const count = Math.ceil(photos.length / PRINTS_A_PAGE);
  return Array.from({ length: count }, (_, page) =>
    photos.slice(page * PRINTS_A_PAGE, (page + 1) * PRINTS_A_PAGE).map(({ number, jpegKey, caption, alt }) => ({
      number,
      key: jpegKey,
      caption: paperText(caption),
      alt: paperText(alt),
    })),
  );
}
