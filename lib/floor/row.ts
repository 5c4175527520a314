/** A stage, or a department, by its key and name. */
export type NamedStage = { key: string; name: string };

/** Whom something waits on, as "the buyer", "us", "you" or a name, and the same as a sentence. */
export type FloorWait = { on: string; words: string };

/** One build as the floor shows it: short, because five hundred travel at once. Days in a stage are working days. */
export type FloorRow = {
  orderNumber: string;
  instrument: string;
  finishHex: string;
  ownerName: string | null;
  repName: string | null;
  routeId: string;
  rack: string | null;
  isHeld: boolean;
  /** The stages of this build where they are not those of its route. */
  ownStages?: NamedStage[];
  /** Place in its stages of the one it is in, or of the next between two; their number once all are finished. */
  at: number;
  /** Share of the stage of now that is done, 0 to 1; 0 between two. */
  share: number;
  department: string | null;
  days: number | null;
  usual: [lowDays: number, highDays: number] | null;
  isLate: boolean;
  /** Days since its owner last saw something new. */
  silentDays: number;
  quiet: 0 | 1 | 2;
  /** "28 Sep to 4 Oct", "ready", or "no date yet". */
  ready: string;
  /** The end of its window, to sort by. */
  readyBy: string | null;
  /** What waits for somebody's word: sign-offs first, then questions, each by its day. */
  waits: FloorWait[];
  /** It cannot go on: its next stage needs something signed, and the clock of its window stands still. */
  isStopped: boolean;
  /** It stands on the viewer's own bench, or is one of this rep's. */
  isMine: boolean;
};

export type FloorRoute = { id: string; name: string; stages: NamedStage[] };

/** The figures over the table, of the builds that the viewer reaches. */
export type FloorFigures = {
  onFloor: number;
  quiet: number;
  longestSilenceDays: number;
  late: number;
  /** Builds that cannot go on until something is signed. */
  waiting: number;
  /** Of all past windows of the shop the share that held, 0 to 1; null while none is judged. */
  held: number | null;
};

export type Floor = {
  figures: FloorFigures;
  routes: FloorRoute[];
  departments: NamedStage[];
  /** Builds that the viewer may know of by their number only. */
  numbersOnly: string[];
  rows: FloorRow[];
};

/** The stages of a row's build, in order. */
export function stagesOfRow({ ownStages, routeId }: FloorRow, routes: readonly FloorRoute[]): NamedStage[] {
  return ownStages ?? routes.find(({ id }) => id === routeId)?.stages ?? [];
}

/** The route of most rows: its stage names head the necks. */
export function commonRoute(rows: readonly FloorRow[], routes: readonly FloorRoute[]): FloorRoute | null {
  const count = (id: string) => rows.filter(({ routeId }) => routeId === id).length;
  return [...routes].sort((one, other) => count(other.id) - count(one.id))[0] ?? null;
}

/** "On the floor": what a row says of its place, such as "Frets" or "all stages finished". */
export function placeWords(row: FloorRow, routes: readonly FloorRoute[]): string {
  const stage = stagesOfRow(row, routes)[row.at];
  if (!stage) return 'all stages finished';
  return row.days === null ? `before ${stage.name}` : stage.name;
}
