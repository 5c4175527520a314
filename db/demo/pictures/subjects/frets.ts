import { addNeck } from '../assembly';
import { brownBench, darkBench, lookAt, paleBench, shopLight, stageOn } from '../bench';
import { BOARD_TOP, dots, fingerboard, fittings, FRET_TOP, frets, fretX, neckShaft, slots } from '../instrument';
import { stripe, tube, turning } from '../loft';
import { joined, type Vec3 } from '../mesh';
import { circle } from '../outline';
import { moved, placed } from '../placing';
import { between } from '../random';
import type { Scene } from '../scene';
import { block, slab } from '../slab';
import type { PictureOrder, Subject } from '../shot';
import { brass, drawn, nickel, pearl, plain, rawWood } from '../surfaces';
import { addFile, addTape } from '../tools';

const boardWood = (seed: number) => rawWood({ species: seed % 2 === 0 ? 'rosewood' : 'ebony', offset: seed % 7 });

function addBoard(scene: Scene, order: PictureOrder, fret: number, count: number, z = 3.4) {
  const fit = fittings(order.body);
  const spot = placed({ x: -fretX(fit, fret), z });
  scene.add(neckShaft(fit), rawWood({ species: 'maple', offset: order.seed % 11 }), spot);
  scene.add(fingerboard(fit), boardWood(order.seed), spot);
  scene.add(slots(fit), plain('#080605'), spot, false);
  scene.add(dots(fit), pearl(), spot, false);
  scene.add(frets(fit, count), nickel(), spot);
  return spot;
}

export const fretting: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  addBoard(scene, order, 8, 8 + (order.seed % 3));
  const handle = turning(
    [
      [0.9, 0],
      [1.1, 1],
      [0.8, 6],
      [1.1, 14],
      [1, 20],
      [0, 20],
    ],
    16,
  );
  const hammer = placed({ x: -8, y: -4.5, z: 5.2, turnZ: 24 });
  scene.add(
    moved(
      turning(
        [
          [1.2, -3.2],
          [1.35, -3],
          [1.35, -1.6],
          [1, -1.3],
          [1, 1.3],
          [1.35, 1.6],
          [1.35, 3],
          [1.2, 3.2],
          [0, 3.2],
        ],
        24,
      ),
      { turnX: 90 },
    ),
    brass(),
    hammer,
  );
  scene.add(moved(handle, { turnY: -90, x: -0.6 }), rawWood({ species: 'ash', offset: 3 }), hammer);
  const wire = Array.from({ length: 40 }, (_, index): Vec3 => [
    9 * Math.cos(index * 0.22),
    9 * Math.sin(index * 0.22),
    0.2 + index * 0.02,
  ]);
  scene.add(tube(wire, 0.14, 8), nickel(), placed({ x: 8, y: -15 }));
  return {
    scene,
    camera: lookAt([-1, -1.5, 3], { bearing: -104, rise: 44, distance: 42, roll: 3, blur: 2 }),
    light: shopLight(random),
  };
};

export const fretLevelling: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const spot = addBoard(scene, order, 10, 24);
  addFile(scene, placed({ x: -7, y: -0.8, z: 3.4 + FRET_TOP, turnZ: between(random, 3, 9) }), 26);
  const fit = fittings(order.body);
  const ink = drawn('#1d3d8f', 0.75, 14);
  const lines = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14].map((fret) =>
    stripe(
      [
        [fretX(fit, fret), 2.2, 0.7],
        [fretX(fit, fret), -2.2, 0.7],
      ],
      0.1,
    ),
  );
  scene.add(joined(...lines), ink, spot);
  for (const side of [-1, 1])
    scene.add(
      block(16, 2.4, 0.02),
      plain('#b79a58', 0.7, 0.12),
      placed({ x: -15, y: side * 3.4, z: 3.9, turnX: side * -4 }),
    );
  return {
    scene,
    camera: lookAt([-1, 0, 4], { bearing: -62, rise: 30, distance: 40, roll: -4, blur: 2.2 }),
    light: shopLight(random),
  };
};

export const fretEnds: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  addBoard(scene, order, 7, 24, 4);
  return {
    scene,
    camera: lookAt([0, -1.8, 4.4], { bearing: -134, rise: 17, distance: 21, roll: 5, blur: 2.4 }),
    light: shopLight(random, 'lamp'),
  };
};

export const fretPolish: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  const spot = placed({ x: -34, z: -2 });
  addNeck(scene, order, spot, {});
  addTape(scene, placed({ x: 6, y: -13 }), '#3f74a0');
  const fit = fittings(order.body);
  for (const fret of [9, 10, 11, 12, 13]) {
    const [from, to] = [fretX(fit, fret) - 34, fretX(fit, fret - 1) - 34];
    scene.add(
      moved(block(Math.max(0.4, to - from - 0.45), 5.2, 0.03, 0.01), { x: (from + to) / 2 }),
      plain('#3f74a0', 0.65, 0.14),
      placed({ z: BOARD_TOP - 2 + 0.04 }),
    );
  }
  const pad = slab({ outline: circle(1.5), bottom: 0, top: 1.5, round: 0.7, cell: 0.5 });
  scene.add(pad, plain('#d8d3c6', 0.95, 0.25), placed({ x: fretX(fit, 11) - 33.6, y: 0.6, z: BOARD_TOP - 1.95 }));
  return {
    scene,
    camera: lookAt([-4, -1, 3.4], { bearing: -118, rise: 40, distance: 36, roll: -3, blur: 2 }),
    light: shopLight(random),
  };
};
