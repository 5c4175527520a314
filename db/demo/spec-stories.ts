import type { PlannedBuild } from './plan';
import type { AimedColour, SpecDocument, SpecItem } from '@/lib/specs/document';
import { labFromHex } from '@/lib/craft/colour-difference';
import { fitTemplate } from '@/lib/specs/fit-template';
import { starterTemplates } from '@/lib/specs/templates';

/** How far a build's spec has come. */
export type SpecStory =
  | 'none'
  | 'draft'
  | 'waiting'
  | 'change wished'
  | 'signed'
  | 'signed twice'
  | 'change asked'
  | 'change offered'
  | 'change signed'
  | 'four versions';

const early = ['waiting', 'signed', 'change wished'] as const;
const late = [
  'signed twice',
  'signed',
  'change offered',
  'signed',
  'signed twice',
  'change asked',
  'signed',
  'change signed',
  'signed twice',
] as const;

/** By where the build is: what is cut has been signed for, what has just been ordered perhaps not. */
export function storyOf(plan: PlannedBuild, index: number): SpecStory {
  if (plan.orderNumber === 'Q-2417') return 'four versions';
  if (plan.deliveredAt !== null) return index % 3 === 0 ? 'signed twice' : 'signed';
  const begun = plan.stages.filter(({ startedAt }) => startedAt !== null).length;
  if (begun <= 1) return index % 2 === 0 ? 'none' : 'draft';
  if (begun <= 3) return early[index % early.length] ?? 'signed';
  return late[index % late.length] ?? 'signed';
}

const templateNames: Record<PlannedBuild['instrument']['name'], string> = {
  'Nightjar baritone': 'Baritone',
  'Nightjar six': 'Six-string, solid body',
  'Heron seven-string': 'Seven-string, two scales',
  Sandpiper: 'Six-string, solid body',
  'Lantern hollow': 'Hollow body',
  'Bittern bass': 'Bass',
};

/** What was first written down for a build: its template with its own scale, finish and colour. */
export function firstDocument({ instrument, finish, stages }: PlannedBuild): SpecDocument {
  const template = starterTemplates.find(({ name }) => name === templateNames[instrument.name]);
  if (!template) throw new RangeError(`no template for ${instrument.name}`);
  const stageKeys = new Set<string>(stages.map(({ key }) => key));
  // A board of two scales has its own pair; the order names the middle of them.
  const scaleLengthIn = instrument.name === 'Heron seven-string' ? null : instrument.scaleLengthIn;
  const { items } = fitTemplate(template.document, { scaleLengthIn, stageKeys });
  const edgeHex = 'edgeHex' in finish ? finish.edgeHex : finish.hex;
  const { l, a, b } = labFromHex(edgeHex, 'D65');
  const colour = { l: tenth(l), a: tenth(a), b: tenth(b), illuminant: 'D65' as const, limitDeltaE: 2 };
  return edited({ items }, [
    ['finish_colour', { words: finish.name }],
    ['edge_colour', { words: 'your sample 2', colour }],
  ]);
}

const tenth = (value: number) => Math.round(value * 10) / 10;

/** What owners and the shop changed, version after version. */
export const edits: [key: string, said: Said][][] = [
  [
    ['fret_wire', { value: 'jumbo, steel' }],
    ['neck_profile', { value: 'D' }],
  ],
  [['neck_depth_1', { aim: { text: '0.815', unit: 'in' } }]],
  [
    ['gloss', { value: 'satin' }],
    ['relief', { aim: { text: '0.007', unit: 'in' } }],
    ['hardware_colour', { value: 'nickel' }],
  ],
];

type Said = {
  words?: string;
  value?: string;
  aim?: { text: string; unit: 'in' };
  colour?: AimedColour;
};

/** The same document with some items said otherwise, each as far as its kind can say it. */
export function edited({ items }: SpecDocument, said: [key: string, said: Said][]): SpecDocument {
  const changes = new Map(said);
  return { items: items.map((item) => saidOtherwise(item, changes.get(item.key) ?? {})) };
}

function saidOtherwise(item: SpecItem, said: Said): SpecItem {
  if (item.kind === 'measure') return { ...item, aim: said.aim ?? item.aim };
  if (item.kind === 'choice') return { ...item, value: said.value ?? item.value };
  if (item.kind === 'material') return { ...item, words: said.words ?? item.words };
  return { ...item, words: said.words ?? item.words, colour: said.colour ?? item.colour };
}

/** A wish for something that is cut already, and what the shop asks for it. */
export const wishes = [
  {
    itemKey: 'radius',
    wish: 'Could the board be a little flatter, 16 in instead of 12? I bend a lot above the 12th.',
    priceCents: 18_000,
    extraDays: 6,
  },
  {
    itemKey: 'nut_width',
    wish: 'I tried a friend’s guitar with a wider nut and would like 1.750 in.',
    priceCents: 42_000,
    extraDays: 12,
  },
] as const;

/** One that the shop could not do, on the build everybody opens first. */
export const declinedWish = {
  itemKey: 'body_shape',
  wish: 'Is it too late for a deeper cutaway on the upper side? I would love to reach the last frets.',
  answer: 'The body is cut and the neck pocket is set to it. We would have to begin again with another flitch.',
};
