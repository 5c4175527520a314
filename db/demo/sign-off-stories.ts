import type { DrawingKind } from './drawings';
import type { PlannedBuild } from './plan';

type State = 'asked' | 'signed' | 'change_asked' | 'superseded';

/** One thing sent to be signed. Days count from now, negative ones are past. */
export type Asked = {
  thing: DrawingKind | 'sample';
  title: string;
  itemKey: string | null;
  message: string;
  askedDay: number;
  dueDay: number;
  state: State;
  answerDay?: number;
  answer?: string;
  /** Whether the next stage waits for it. */
  blocks?: boolean;
  /** A later one of the same thing. */
  replaces?: boolean;
};

const logo = (number: number, rest: Omit<Asked, 'thing' | 'title' | 'itemKey'>): Asked => ({
  thing: 'headstock',
  title: `Headstock logo, drawing ${number}`,
  itemKey: 'headstock_logo',
  ...rest,
});

/** The first build's: two drawings sent back, the third waits; its colour was signed long ago. */
const first: Asked[] = [
  {
    thing: 'sample',
    title: 'Edge colour, sample 2',
    itemKey: 'edge_colour',
    message: 'Darker at the rim than sample 1, as you asked. Hold it to the window.',
    askedDay: -61,
    dueDay: -54,
    state: 'signed',
    answerDay: -58,
  },
  logo(1, {
    message: 'Our house letters in shell, 54 mm wide.',
    askedDay: -24,
    dueDay: -17,
    state: 'superseded',
    answerDay: -21,
    answer: 'A little larger, please, and nearer to the nut.',
  }),
  logo(2, {
    message: 'Larger, and 6 mm towards the nut.',
    askedDay: -14,
    dueDay: -7,
    state: 'superseded',
    answerDay: -10,
    answer: 'Almost. The last letter touches the low tuner.',
    replaces: true,
  }),
  logo(3, {
    message: 'All of it moved by 3 mm, so that it clears the tuner. With your name we cut the shell.',
    askedDay: -3,
    dueDay: 4,
    state: 'asked',
    blocks: true,
    replaces: true,
  }),
];

const waits = (dueDay: number): Asked[] => [
  {
    thing: 'controls',
    title: 'Control layout, drawing 1',
    itemKey: null,
    message: 'Three knobs on the curve you drew for us at the fitting.',
    askedDay: -4,
    dueDay,
    state: 'asked',
    blocks: true,
  },
];

const signed: Asked[] = [
  {
    thing: 'inlay',
    title: 'Inlay, drawing 1',
    itemKey: 'inlay',
    message: 'Shell dots of 6 mm, the two at the twelfth a finger apart.',
    askedDay: -30,
    dueDay: -20,
    state: 'signed',
    answerDay: -27,
  },
];

const sample: Asked[] = [
  {
    thing: 'sample',
    title: 'Colour, sample 1',
    itemKey: 'finish_colour',
    message: 'On an offcut of your own top.',
    askedDay: -6,
    dueDay: 3,
    state: 'asked',
  },
];

const sentBack: Asked[] = [
  logo(1, {
    message: 'Letters in brass this time.',
    askedDay: -8,
    dueDay: 2,
    state: 'change_asked',
    answerDay: -2,
    answer: 'Could the brass be brushed instead of polished? I play under lights.',
    blocks: true,
  }),
];

const secondSigned: Asked[] = [
  {
    thing: 'inlay',
    title: 'Inlay, drawing 1',
    itemKey: 'inlay',
    message: 'Dots of 5 mm.',
    askedDay: -40,
    dueDay: -33,
    state: 'superseded',
    answerDay: -37,
    answer: 'Larger dots, please. I read them from above.',
  },
  {
    thing: 'inlay',
    title: 'Inlay, drawing 2',
    itemKey: 'inlay',
    message: 'Now 7 mm.',
    askedDay: -34,
    dueDay: -26,
    state: 'signed',
    answerDay: -33,
    replaces: true,
  },
];

const drawn = {
  wood: [waits(9), []],
  making: [signed, sample, sentBack, [...signed, ...waits(-2)], secondSigned],
  finishing: [secondSigned, sentBack, signed, waits(5)],
  checking: [signed],
};

/** What was sent for a build of the floor, oldest first, by how many of its stages have begun. */
export function signOffStory({ orderNumber, stages }: PlannedBuild, index: number): Asked[] {
  if (orderNumber === 'Q-2417') return first;
  const begun = stages.filter(({ startedAt }) => startedAt !== null).length;
  const part =
    begun <= 2 ? drawn.wood : begun <= 7 ? drawn.making : begun < stages.length ? drawn.finishing : drawn.checking;
  return part[index % part.length] ?? [];
}
