import { addInstrument } from '../assembly';
import { addFarShop, brownBench, darkBench, lookAt, paleBench, rough, shopLight, stageOn } from '../bench';
import { fittings, nutX } from '../instrument';
import { tube, turning } from '../loft';
import { cloud, smooth } from '../noise';
import { joined } from '../mesh';
import { roundedRect } from '../outline';
import { moved, placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import type { Subject } from '../shot';
import { brass, cloth, nickel, plain, steel } from '../surfaces';

export const onTheBench: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const spot = placed({ x: -22, y: -4, z: 0.6, turnZ: between(random, 14, 22) });
  addInstrument(scene, order, spot);
  const neck = within(spot, placed({ x: nutX(fittings(order.body)) - 8, z: 0 }));
  scene.add(block(6, 9, 2.9, 0.8), plain('#5a3b28', 0.9, 0.25), neck);
  return {
    scene,
    camera: lookAt([0, 3, 2], {
      bearing: -86,
      rise: 52,
      distance: order.body === 'bass' ? 166 : 140,
      roll: -3,
      blur: 1.2,
    }),
    light: shopLight(random),
  };
};

export const uprightPortrait: Subject = (order, random) => {
  const scene = stageOn(brownBench(), 90);
  const length = fittings(order.body).scale;
  const spot = placed({ x: between(random, -2, 2), y: -length * 0.36, z: 0.6, turnZ: 90 + between(random, -4, 4) });
  addInstrument(scene, order, spot);
  return {
    scene,
    camera: lookAt([0, length * 0.02 - 2, 2], {
      bearing: -90,
      rise: 66,
      distance: order.body === 'bass' ? 182 : 146,
      roll: 2,
      blur: 1.2,
    }),
    light: shopLight(random),
    tall: true,
  };
};

export const inTheCase: Subject = (order, random) => {
  const scene = stageOn(rough('#6b655b', 0.2), 20);
  const fit = fittings(order.body);
  const long = fit.scale + 62;
  const shell = plain('#1c1d1f', 0.5, 0.25);
  const case_ = placed({ turnZ: between(random, 16, 24) });
  const outer = roundedRect(long, 48, 8, 8);
  const inner = roundedRect(long - 5, 43, 6.5, 8);
  scene.add(slab({ outline: outer, bottom: 0, top: 1.4, cell: 6 }), shell, case_);
  scene.add(slab({ outline: outer, holes: [inner], bottom: 1.3, top: 11, round: 0.5, cell: 1 }), shell, case_);
  const plush = cloth('#6b2f38');
  const pillow = slab({
    outline: inner,
    bottom: 1.4,
    top: 2.4,
    cell: 1.6,
    arch: (depth, x, y) => smooth(6, 0, depth) * 3.4 + cloud(x * 0.1, y * 0.1, 3) * 0.7,
  });
  scene.add(pillow, plush, case_);
  const rest = moved(block(12, 30, 4, 1.4), { x: nutX(fit) - long * 0.33 - 14, z: 2.6 });
  scene.add(rest, plush, case_);
  addInstrument(scene, order, within(case_, placed({ x: -long * 0.33 + 6, z: 3.6 })));
  const latch = joined(block(4, 0.6, 2.4, 0.2), moved(block(2.4, 0.9, 3.4, 0.3), { z: -1 }));
  for (const x of [-long * 0.3, long * 0.1, long * 0.36])
    scene.add(latch, brass(), within(case_, placed({ x, y: -24.2, z: 7 })));
  const lid = within(case_, placed({ y: 24, z: 11, turnX: 72 }));
  scene.add(
    slab({ outline: roundedRect(long, 44, 8, 8).map(([x, y]) => [x, y + 22] as const), bottom: -6, top: -5, cell: 6 }),
    plush,
    lid,
  );
  scene.add(
    slab({
      outline: roundedRect(long, 44, 8, 8).map(([x, y]) => [x, y + 22] as const),
      holes: [roundedRect(long - 5, 39, 6.5, 8).map(([x, y]) => [x, y + 22] as const)],
      bottom: -5.2,
      top: 0,
      round: 0.4,
      cell: 1.2,
    }),
    shell,
    lid,
  );
  return {
    scene,
    camera: lookAt([-4, 3, 4], {
      bearing: -84,
      rise: 44,
      distance: order.body === 'bass' ? 186 : 160,
      roll: -2,
      blur: 1.3,
    }),
    light: shopLight(random),
  };
};

export const headstockDone: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  addFarShop(scene, random, 80);
  const fit = fittings(order.body);
  const spot = placed({ x: -nutX(fit) - 8, z: 1.2, turnZ: 0 });
  addInstrument(scene, order, spot);
  scene.add(block(7, 9, 4, 0.8), plain('#3b3f44', 0.9, 0.2), placed({ x: -16, z: 0.2 }));
  return {
    scene,
    camera: lookAt([0, 0, 5.4], { bearing: -58, rise: 30, distance: 36, roll: 3, blur: 2, focus: 34 }),
    light: shopLight(random),
  };
};

export const finalLook: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  addFarShop(scene, random, 140);
  const spot = placed({ x: -6, y: 0, z: 0.6, turnZ: between(random, 28, 40) });
  addInstrument(scene, order, spot);
  const shade = turning(
    [
      [2.2, 8],
      [3, 7.6],
      [7.6, 0.6],
      [7.8, 0],
      [7.4, 0.5],
    ],
    36,
  );
  scene.add(shade, plain('#2f5a4c', 0.3, 0.05), placed({ x: -14, y: 23, z: 19, turnY: -18 }));
  scene.add(
    tube(
      [
        [-16, 23, 26],
        [-22, 25, 34],
        [-26, 29, 0],
      ],
      0.7,
      10,
    ),
    nickel(),
    placed({}),
  );
  scene.add(
    turning(
      [
        [7, 0],
        [7, 1],
        [1, 1.6],
        [1, 2],
      ],
      32,
    ),
    steel(),
    placed({ x: -26, y: 29 }),
  );
  return {
    scene,
    camera: lookAt([2, 5, 7], { bearing: -80, rise: 24, distance: 84, roll: 2, blur: 1.6, focus: 76 }),
    light: shopLight(random, 'lamp'),
  };
};
