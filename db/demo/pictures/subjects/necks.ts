import { addNeck, bare } from '../assembly';
import { brownBench, darkBench, ground, lookAt, paleBench, rubberMat, shopLight, stageOn } from '../bench';
import { headOutline, TUNERS } from '../bodies';
import { dots, fingerboard, fittings, fretX, headstock, neckShaft, nutX, slots } from '../instrument';
import { turning } from '../loft';
import { lineAlong } from '../marks';
import { moved, placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import { circle } from '../outline';
import type { Subject } from '../shot';
import { drawn, dusty, pearl, plain, rawWood, steel } from '../surfaces';
import { addClamp, addFile, addPencil, addRule, addShavings, addTape } from '../tools';

const boardWood = (seed: number) => rawWood({ species: seed % 2 === 0 ? 'rosewood' : 'ebony', offset: seed % 7 });

export const slottedBoard: Subject = (order, random) => {
  const scene = stageOn(paleBench(), 8);
  const fit = fittings(order.body);
  const spot = placed({ x: -30, y: 0, z: 0.05, turnZ: between(random, -3, 3) });
  scene.add(fingerboard(fit), boardWood(order.seed & ~1), spot);
  scene.add(slots(fit), plain('#080605'), spot, false);
  addRule(scene, placed({ x: -24, y: 5, turnZ: 1 }));
  addPencil(scene, placed({ x: 16, y: -8, turnZ: 162 }));
  scene.add(ground(70), dusty('#4a2f22', 0.5, 0.14), placed({ z: 0.02 }));
  return {
    scene,
    camera: lookAt([-1, 0, 0.5], { bearing: -118, rise: 42, distance: 30, roll: 4, blur: 2 }),
    light: shopLight(random),
  };
};

export const inlayDots: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const fit = fittings(order.body);
  const middle = fretX(fit, 12);
  const spot = placed({ x: -middle, turnZ: 0 });
  scene.add(fingerboard(fit), boardWood(order.seed), spot);
  scene.add(slots(fit), plain('#080605'), spot, false);
  scene.add(dots(fit, 0.36), pearl(), spot, false);
  const loose = slab({ outline: circle(0.36), bottom: 0, top: 0.16, round: 0.03, cell: 0.3 });
  for (let index = 0; index < 5; index++)
    scene.add(
      loose,
      pearl(),
      placed({ x: between(random, -6, 5), y: -4.4 - random() * 2.4, z: 0.02, turnX: between(random, -8, 8) }),
    );
  scene.add(block(40, 4.8, 0.01), dusty('#caa27a', 0.4, 0.5), placed({ z: 0.63 }));
  return {
    scene,
    camera: lookAt([0.4, -0.6, 0.5], { bearing: -106, rise: 50, distance: 25, roll: -5, blur: 2.6 }),
    light: shopLight(random),
  };
};

export const boardGlued: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const fit = fittings(order.body);
  const spot = placed({ x: -30, z: 4, turnZ: 0 });
  scene.add(neckShaft(fit), rawWood({ species: 'maple', offset: order.seed % 11 }), spot);
  scene.add(fingerboard(fit), boardWood(order.seed), spot);
  scene.add(
    moved(block(52, 5, 2.6, 0.2), { x: 3 }),
    rawWood({ species: 'spruce', offset: 2 }, 0.4),
    placed({ z: 4.6 }),
  );
  for (let index = 0; index < 6; index++)
    addClamp(
      scene,
      placed({ x: index * 10 - 23, z: 0.6, turnZ: between(random, -6, 6) }),
      6.6,
      7,
      index % 3 === 1 ? '#35618a' : '#a33a24',
    );
  addTape(scene, placed({ x: 20, y: -18 }), '#d9d3be');
  return {
    scene,
    camera: lookAt([-2, 1, 6], { bearing: -52, rise: 40, distance: 62, roll: 5, blur: 1.8 }),
    light: shopLight(random),
    tall: random() < 0.3,
  };
};

export const headstockShaped: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#4a5157'));
  const spot = placed({ x: -8, y: 0, z: 2.2, turnZ: between(random, 10, 24) });
  const fit = fittings(order.body);
  const wood = rawWood({ species: 'maple', figure: 'flame', offset: order.seed % 12 });
  scene.add(headstock(), wood, spot);
  scene.add(neckShaft(fit), wood, within(spot, placed({ x: -nutX(fit), turnY: -8, z: -8 })));
  const hole = slab({ outline: circle(0.45), bottom: 0, top: 0.01, cell: 0.3 });
  for (const [x, y] of TUNERS) scene.add(hole, plain('#120b06'), within(spot, placed({ x, y, z: 0.005 })), false);
  const rim = headOutline().map(([x, y]) => [x * 0.985 + 0.15, y * 0.96] as const);
  scene.add(lineAlong(rim, 0.01, 0.06), drawn('#332d2a', 0.5, 12), spot);
  addFile(scene, placed({ x: -2, y: -9.5, turnZ: 12 }));
  addShavings(scene, random, placed({ x: 9, y: 9 }), 12, 8);
  scene.add(ground(70), dusty('#e0c89c', 0.7, 0.16), placed({ z: 0.02 }));
  return {
    scene,
    camera: lookAt([1, -0.5, 2], { bearing: -98, rise: 54, distance: 46, roll: -3, blur: 1.8 }),
    light: shopLight(random),
  };
};

export const neckCarving: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const fit = fittings(order.body);
  const spot = placed({ x: 28, y: 1, z: 5.2, turnX: 180, turnZ: 176 });
  scene.add(neckShaft(fit), rawWood({ species: 'maple', figure: 'flame', offset: order.seed % 9 }), spot);
  scene.add(moved(fingerboard(fit), { z: 0 }), boardWood(order.seed), spot);
  for (const x of [-22, 18]) scene.add(block(7, 11, 4.2, 0.5), plain('#5a3b28', 0.8, 0.25), placed({ x, z: 0.2 }));
  const handle = turning(
    [
      [0.6, 0],
      [1.25, 0.7],
      [1.5, 4],
      [1.3, 8],
      [0.7, 9.4],
      [0, 9.4],
    ],
    16,
  );
  const grip = rawWood({ species: 'walnut', offset: 4 });
  const tool = placed({ x: -3, y: -3.5, z: 7.2, turnZ: 62 });
  scene.add(moved(block(13, 3.2, 0.9, 0.2), {}), steel(), tool);
  for (const side of [-1, 1]) scene.add(moved(handle, { turnY: side * 90, x: side * 6.5, z: 0.5 }), grip, tool);
  addShavings(scene, random, placed({ x: 0, y: -8 }), 55, 15);
  return {
    scene,
    camera: lookAt([-2, 0, 4], { bearing: -80, rise: 38, distance: 60, roll: -4, blur: 1.9 }),
    light: shopLight(random, 'lamp'),
  };
};

export const neckBlanksShaped: Subject = (order, random) => {
  const scene = stageOn(brownBench(), 4);
  for (let index = 0; index < 3; index++) {
    const spot = placed({ x: -34 - index * 3, y: index * 12 - 12, turnZ: between(random, -3, 3), z: 2 });
    addNeck(scene, { ...order, seed: order.seed + index * 5 }, within(spot, placed({ z: -3 })), {
      fretted: false,
      slotted: true,
      nutted: false,
      head: bare(order).top,
    });
  }
  return {
    scene,
    camera: lookAt([8, 0, 3], { bearing: -62, rise: 36, distance: 76, roll: 4, blur: 1.9 }),
    light: shopLight(random),
  };
};
