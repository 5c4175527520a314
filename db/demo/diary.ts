import { benchNotes, shopNotes } from './notes';
import type { Cast, Person } from './people';
import type { LibraryPhoto, PhotoLibrary } from './photo-library';
import type { PlannedBuild } from './plan';
import { DAY_MS, type TimedStage } from './timeline';
import { plainNote } from '@/lib/rich-text/plain-text';

export type PlannedEntry = {
  stagePosition: number;
  author: Person;
  text: string;
  body: string;
  audience: 'buyer' | 'shop';
  datedAt: number;
  photos: LibraryPhoto[];
};

/** The pages of one build, oldest first: one or two a stage, with pictures where the plan asks for them. */
export async function planEntries(
  build: PlannedBuild,
  cast: Cast,
  library: PhotoLibrary,
  nowMs: number,
): Promise<PlannedEntry[]> {
  const entries: PlannedEntry[] = [];
  const orderIndex = Number(build.orderNumber.slice(2));
  for (const [stagePosition, stage] of build.stages.entries()) {
    if (stage.startedAt === null) break;
    const isLatest = build.stages[stagePosition + 1]?.startedAt == null;
    const notes = benchNotes[stage.key];
    const count = build.isFeatured ? notes.length : isLatest ? 1 : 0;
    for (let index = 0; index < count; index++) {
      const text = notes[(index + (build.isFeatured ? 0 : orderIndex)) % notes.length] ?? '';
      const photos = await library.ofStage(stage.key, lookOf(build), index, photoCount(build, index));
      const datedAt = Math.min(dateOf(stage, index, count, nowMs), build.silentSinceAt ?? nowMs);
      entries.push({
        stagePosition,
        author: authorOf(stage, cast, orderIndex),
        text,
        body: bodyOf(text),
        audience: 'buyer',
        datedAt,
        photos,
      });
    }
  }
  return build.isFeatured ? withShopNote(entries, orderIndex) : entries;
}

const lookOf = ({ finish, instrument }: PlannedBuild) => ({ finish, body: instrument.body });
const bodyOf = (text: string) => JSON.stringify(plainNote(text));

function photoCount({ isFeatured, deliveredAt }: PlannedBuild, index: number): number {
  if (deliveredAt !== null && !isFeatured) return 0;
  return isFeatured ? (index === 0 ? 3 : 1) : 1;
}

function dateOf({ startedAt, finishedAt }: TimedStage, index: number, count: number, nowMs: number): number {
  const from = startedAt ?? nowMs;
  const to = Math.min(finishedAt ?? nowMs, nowMs);
  const share = (index + 0.4) / count;
  const workTime = 15 * 3_600_000 + index * 2_700_000;
  const day = Math.floor((from + (to - from) * share) / DAY_MS) * DAY_MS;
  return Math.min(Math.max(day + workTime, from), nowMs - 90 * 60_000);
}

function authorOf({ department }: TimedStage, cast: Cast, orderIndex: number): Person {
  const able = cast.builders.filter((builder) => builder.department === department);
  const [first = cast.admin] = cast.builders;
  return able[orderIndex % Math.max(1, able.length)] ?? first;
}

function withShopNote(entries: PlannedEntry[], orderIndex: number): PlannedEntry[] {
  const after = entries.at(-2);
  const text = shopNotes[orderIndex % shopNotes.length];
  if (!after || !text) return entries;
  const note: PlannedEntry = {
    ...after,
    text,
    body: bodyOf(text),
    audience: 'shop',
    photos: [],
    datedAt: after.datedAt + 1_200_000,
  };
  return [...entries, note].sort((a, b) => a.datedAt - b.datedAt);
}
