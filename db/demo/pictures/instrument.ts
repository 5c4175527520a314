import { BODY_TOP, type BodyKind, headOutline, TUNERS } from './bodies';
import { loft, stripe, tube, turning } from './loft';
import { joined, type Mesh, type Vec3 } from './mesh';
import { circle, roundedRect } from './outline';
import { moved } from './placing';
import { block, slab } from './slab';

/** Where the string leaves the saddle, the vibrating length and how many strings, cm. */
export type Fittings = { saddleX: number; scale: number; strings: number };

export const fittings = (kind: BodyKind): Fittings =>
  kind === 'bass' ? { saddleX: -13, scale: 86.4, strings: 4 } : { saddleX: -10.5, scale: 64.8, strings: 6 };

export const BOARD_TOP = BODY_TOP + 1.35;
const FRETS = 24;
const NUT_WIDTH = 4.3;

export const nutX = ({ saddleX, scale }: Fittings) => saddleX + scale;

/** Twelve-tone equal temperament, measured from the nut towards the body. */
export const fretX = (fit: Fittings, fret: number) => nutX(fit) - fit.scale * (1 - 2 ** (-fret / 12));

/** Width of the board where its distance from the nut is `along` cm. */
export const boardWidth = (along: number) => NUT_WIDTH + along * 0.028;

const boardEnd = (fit: Fittings) => fretX(fit, FRETS) - 0.9;

/** Fingerboard: 0.6 thick, with a crowned top; its underside is at z = 0. */
export function fingerboard(fit: Fittings): Mesh {
  const [from, to] = [nutX(fit), boardEnd(fit)];
  const rings = Array.from({ length: 25 }, (_, step) => {
    const x = from + ((to - from) * step) / 24;
    const half = boardWidth(from - x) / 2;
    const crown = Array.from({ length: 11 }, (_, index): Vec3 => {
      const y = half * (1 - index / 5);
      return [x, y, crownAt(y)];
    });
    return [
      [x, half, 0] as Vec3,
      [x, half, crownAt(half) - 0.03] as Vec3,
      ...crown,
      [x, -half, crownAt(half) - 0.03] as Vec3,
      [x, -half, 0] as Vec3,
    ];
  });
  return loft(rings);
}

/** Height of the board's crown across its width (a 30 cm radius). */
export const crownAt = (y: number) => 0.6 - (y * y) / 60;

/** Height of a fret's crown above the board's underside, for tools that rest on it. */
export const FRET_TOP = crownAt(0) + 0.14;

const across = (fit: Fittings, x: number, lift: number, shorten = 0): Vec3[] => {
  const half = boardWidth(nutX(fit) - x) / 2 - shorten;
  return Array.from({ length: 9 }, (_, index): Vec3 => {
    const y = half * (1 - index / 4);
    return [x, y, crownAt(y) + lift];
  });
};

const fretNumbers = (count: number) => Array.from({ length: count }, (_, index) => index + 1);

export const frets = (fit: Fittings, count = FRETS): Mesh =>
  joined(...fretNumbers(count).map((fret) => tube(across(fit, fretX(fit, fret), 0.015, 0.02), 0.125, 10)));

export const slots = (fit: Fittings): Mesh =>
  joined(...fretNumbers(FRETS).map((fret) => stripe(across(fit, fretX(fit, fret), 0.008), 0.075)));

/** Position dots: single at the odd places, two at each octave. */
export function dots(fit: Fittings, radius = 0.33): Mesh {
  const dot = (fret: number, y: number) => {
    const x = (fretX(fit, fret) + fretX(fit, fret - 1)) / 2;
    const shape = slab({ outline: circle(radius), bottom: -0.1, top: 0.012, round: 0.01, cell: 0.3 });
    return moved(shape, { x, y, z: crownAt(y) });
  };
  const single = [3, 5, 7, 9, 15, 17, 19, 21].map((fret) => dot(fret, 0));
  return joined(...single, dot(12, 1.2), dot(12, -1.2), dot(24, 1.2), dot(24, -1.2));
}

/** Neck under the board: its flat face at z = 0, from the pocket to the nut. */
export function neckShaft(fit: Fittings): Mesh {
  const [from, to] = [nutX(fit) + 0.6, boardEnd(fit)];
  const rings = Array.from({ length: 31 }, (_, step) => {
    const x = from + ((to - from) * step) / 30;
    const half = boardWidth(Math.max(0, from - x)) / 2;
    const heel = Math.max(0, (15.5 - x) / 4);
    const depth = 1.55 + 0.012 * (from - x) + Math.min(1, heel) ** 2 * 0.9;
    const square = 1 - 0.55 * Math.min(1, heel);
    return Array.from({ length: 15 }, (_, index): Vec3 => {
      const angle = (index / 14) * Math.PI;
      const bulge = (value: number) => Math.sign(value) * Math.abs(value) ** square;
      return [x, half * bulge(Math.cos(angle)), -depth * Math.abs(Math.sin(angle)) ** square];
    });
  });
  return loft(rings);
}

/** Headstock with its face at z = 0, nut end at x = 0. */
export const headstock = (): Mesh => slab({ outline: headOutline(), bottom: -1.5, top: 0, round: 0.16, cell: 0.9 });

export function tuners(count: number): { posts: Mesh; keys: Mesh } {
  const chosen = count === 4 ? TUNERS.filter((_, index) => index % 3 !== 2) : TUNERS;
  const post = turning([
    [0.62, 0],
    [0.62, 0.12],
    [0.42, 0.16],
    [0.32, 0.3],
    [0.27, 0.8],
    [0.33, 1],
    [0.3, 1.1],
    [0, 1.1],
  ]);
  const key = slab({ outline: roundedRect(1.5, 1.9, 0.55), bottom: 0, top: 0.55, round: 0.25, cell: 0.6 });
  return {
    posts: joined(...chosen.map(([x, y]) => moved(post, { x, y }))),
    keys: joined(
      ...chosen.flatMap(([x, y]) => {
        const side = Math.sign(y);
        const stem = tube(
          [
            [x, y + side * 0.6, -0.9],
            [x, side * 5.4, -0.9],
          ],
          0.2,
        );
        return [stem, moved(key, { x, y: side * 6.1, z: -1.2 })];
      }),
    ),
  };
}

/** Strings from the saddles over the nut to the posts; heights are above the board's underside. */
export function strings(fit: Fittings, saddleZ: number): Mesh {
  const each = Array.from({ length: fit.strings }, (_, index) => {
    const place = index / (fit.strings - 1) - 0.5;
    const radius = (fit.strings === 4 ? 0.035 : 0.016) + 0.026 * (1 - (place + 0.5));
    const start: Vec3 = [fit.saddleX, -place * -7.2, saddleZ];
    const atNut: Vec3 = [nutX(fit), place * 3.6, crownAt(place * 3.6) + 0.22];
    const side = index * 2 < fit.strings ? -1 : 1;
    const [postX, postY] = [5.4 + (side > 0 ? fit.strings - 1 - index : index) * 4, side * 2.5];
    const end: Vec3 = [nutX(fit) + postX, postY - side * 0.3, 0.3 - postX * 0.13];
    return tube([start, atNut, end], radius, 6);
  });
  return joined(...each);
}

export const nut = (fit: Fittings): Mesh => moved(block(0.55, NUT_WIDTH, 0.95, 0.12), { x: nutX(fit) + 0.28 });

/** Pick-up with a row of pole pieces: its foot at z = 0. */
export function pickup(poles: number): { cover: Mesh; poles: Mesh } {
  const cover = slab({ outline: roundedRect(3.6, 8.7, 0.42), bottom: 0, top: 1.5, round: 0.28, cell: 1 });
  const pole = turning(
    [
      [0.22, 1.4],
      [0.22, 1.56],
      [0.17, 1.6],
      [0, 1.6],
    ],
    14,
  );
  const rows = Array.from({ length: poles }, (_, index) =>
    moved(pole, { x: 0.8, y: (index / (poles - 1) - 0.5) * 6.6 }),
  );
  return { cover, poles: joined(...rows) };
}

/** Bridge about the saddle line at x = 0, its foot at z = 0. */
export function bridge(count: number): { plate: Mesh; saddles: Mesh } {
  const plate = joined(
    moved(slab({ outline: roundedRect(4.6, 8.6, 0.35), bottom: 0, top: 0.3, round: 0.1, cell: 1 }), { x: -1 }),
    moved(block(0.3, 8.6, 1.1, 0.1), { x: -3.2 }),
  );
  const parts = Array.from({ length: count }, (_, index) => {
    const y = (index / (count - 1) - 0.5) * 7.2;
    const screw = tube(
      [
        [-3.3, y, 0.72],
        [0, y, 0.72],
      ],
      (t) => 0.11 + 0.03 * (Math.round(t * 40) % 2),
      7,
    );
    const spring = tube(
      Array.from({ length: 61 }, (_, step): Vec3 => {
        const angle = step * 0.9;
        return [-2.9 + step * 0.035, y + 0.2 * Math.cos(angle), 0.72 + 0.2 * Math.sin(angle)];
      }),
      0.035,
      5,
    );
    const saddle = slab({
      outline: roundedRect(1.5, (7 / count) * 0.86, 0.18),
      bottom: 0,
      top: 0.78,
      round: 0.18,
      cell: 0.6,
    });
    const wheel = (side: number) =>
      moved(
        turning(
          [
            [0.12, 0.3],
            [0.12, 1.02],
            [0, 1.02],
          ],
          8,
        ),
        { x: 0.4, y: y + side * 0.3 },
      );
    return joined(screw, spring, moved(saddle, { y, z: 0.3 }), wheel(1), wheel(-1));
  });
  return { plate, saddles: joined(...parts) };
}

export const knob = (): Mesh =>
  turning(
    [
      [1.05, 0],
      [1.08, 0.2],
      [0.98, 0.3],
      [0.96, 1.4],
      [0.86, 1.52],
      [0.3, 1.56],
      [0, 1.5],
    ],
    32,
  );
