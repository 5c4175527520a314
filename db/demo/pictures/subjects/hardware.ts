import { addBody, addHardware, addNeck, ARCH, finished } from '../assembly';
import { brownBench, darkBench, lookAt, paleBench, rubberMat, shopLight, stageOn } from '../bench';
import { BODY_TOP, bodyOutline, CONTROL_CAVITY } from '../bodies';
import { BOARD_TOP, bridge, fittings, fretX, nutX, pickup } from '../instrument';
import { tube, turning } from '../loft';
import { joined, type Vec3 } from '../mesh';
import { circle, smoothPath } from '../outline';
import { moved, placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import { backCut, type PictureOrder, type Subject } from '../shot';
import { brass, coated, cloth, metal, nickel, plain, steel } from '../surfaces';
import { addDriver, addMeter, addRule } from '../tools';
import { Scene } from '../scene';

const TOP = BODY_TOP + ARCH;

function addAll(scene: Scene, order: PictureOrder, spot: ReturnType<typeof placed>, strung = true) {
  const look = finished(order);
  addBody(scene, order, look, spot);
  addNeck(scene, order, spot, { head: look.top });
  addHardware(scene, order, spot, strung);
}

export const controlWiring: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const spot = placed({ x: 12, y: 6, turnZ: between(random, -6, 8), turnX: 0 });
  const back = coated({
    cut: backCut(order),
    colour: { hex: order.finish.edgeHex ?? order.finish.hex },
    gloss: 0.9,
    reach: 2,
  });
  const outline = bodyOutline(order.body);
  scene.add(slab({ outline, bottom: 0, top: 1, cell: 3 }), plain('#1e2022', 0.6, 0.2), spot);
  scene.add(slab({ outline, holes: [CONTROL_CAVITY], bottom: 0.99, top: 4.4, round: 0.8, cell: 0.35 }), back, spot);
  const pot = turning(
    [
      [1.2, 0],
      [1.2, 1],
      [1.05, 1.15],
      [0, 1.15],
    ],
    30,
  );
  const lug = joined(...[-0.6, 0, 0.6].map((x) => moved(block(0.3, 0.9, 0.1, 0.02), { x, y: 1.5, z: 0.3 })));
  for (const [x, y] of [
    [-8.4, -8.6],
    [-12.6, -8.2],
  ] as const) {
    scene.add(pot, metal('#b9bcbf', 0.3, 0.5), within(spot, placed({ x, y, z: 1.1 })));
    scene.add(lug, brass(), within(spot, placed({ x, y, z: 1.1, turnZ: 20 })));
    scene.add(
      moved(
        turning(
          [
            [0.5, 0],
            [0.42, 0.16],
            [0, 0.2],
          ],
          14,
        ),
        { x: 0.3, y: 0.2, z: 1.12 },
      ),
      steel(),
      within(spot, placed({ x, y, z: 1.1 })),
    );
  }
  scene.add(
    moved(
      turning(
        [
          [0.45, -0.7],
          [0.5, -0.6],
          [0.5, 0.6],
          [0.45, 0.7],
          [0, 0.7],
        ],
        16,
      ),
      { turnX: 90 },
    ),
    plain('#c8642a', 0.3),
    within(spot, placed({ x: -10.4, y: -7.2, z: 2.2, turnZ: 55 })),
  );
  const colours = ['#b3261e', '#e8e6df', '#1d1e20', '#2f7a43', '#d2a72c', '#e8e6df'];
  colours.forEach((hex, index) => {
    const flat = smoothPath(
      [
        [-5.2, -7 - index * 0.3],
        [-7.4 - index * 0.5, -6.4 - random() * 1.4],
        [-9.6 - random() * 2, -7.6 - random() * 2.6],
        [-8 - index * 0.9, -8.9 + random() * 0.8],
      ],
      8,
    );
    const path = flat.map(([x, y], step): Vec3 => [
      x,
      y,
      2 + 1.5 * Math.sin((step / flat.length) * 3.1) + index * 0.06,
    ]);
    scene.add(tube(path, 0.16, 8), plain(hex, 0.4, 0.05), spot);
  });
  const iron = placed({ x: 6.2, y: -4.4, z: 4.8, turnZ: 16 });
  scene.add(
    moved(
      turning(
        [
          [0.05, -4],
          [0.22, -3.4],
          [0.25, 0],
          [0.5, 0.3],
          [0.55, 5],
        ],
        16,
      ),
      { turnY: 90 },
    ),
    metal('#9d9a94', 0.3, 0.4),
    iron,
  );
  scene.add(
    moved(
      turning(
        [
          [0.8, 4.6],
          [1.1, 5.4],
          [1, 14],
          [0, 14],
        ],
        18,
      ),
      { turnY: 90 },
    ),
    plain('#2f5d7a', 0.45),
    iron,
  );
  return {
    scene,
    camera: lookAt([2.4, -1.6, 3.6], { bearing: -96, rise: 56, distance: 33, roll: 4, blur: 2 }),
    light: shopLight(random, 'lamp'),
  };
};

export const pickupsIn: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#3c4347'));
  const spot = placed({ x: 2, z: 0.3, turnZ: between(random, 10, 22) });
  addBody(scene, order, finished(order), spot);
  const parts = pickup(fittings(order.body).strings);
  const shell = plain('#17181a', 0.3, 0.06);
  scene.add(parts.cover, shell, within(spot, placed({ x: 1.2, z: TOP - 0.9 })));
  scene.add(parts.poles, steel(), within(spot, placed({ x: 1.2, z: TOP - 0.9 })));
  const lifted = within(spot, placed({ x: -13, y: -1.6, z: TOP - 0.2, turnX: 4, turnY: -3, turnZ: 14 }));
  scene.add(parts.cover, shell, lifted);
  scene.add(parts.poles, steel(), lifted);
  for (const [index, hex] of ['#e8e6df', '#b3261e'].entries()) {
    const wire: Vec3[] = smoothPath(
      [
        [-12.6, 2.8],
        [-11, 5.4 + index],
        [-8.2, 5.2],
        [-6.6, 3.2 - index * 0.4],
      ],
      8,
    ).map(([x, y], step) => [x, y, TOP + 0.5 - step * 0.06]);
    scene.add(tube(wire, 0.13, 8), plain(hex, 0.4), spot);
  }
  addDriver(scene, placed({ x: -4, y: -20, turnZ: 22 }));
  const screw = turning(
    [
      [0.3, 0],
      [0.3, 0.12],
      [0.12, 0.2],
      [0.1, 1.6],
      [0.02, 1.9],
    ],
    12,
  );
  for (let index = 0; index < 4; index++)
    scene.add(
      moved(screw, { turnY: 84 }),
      nickel(),
      placed({ x: 8 + random() * 7, y: -17 - random() * 5, z: 0.3, turnZ: random() * 360 }),
    );
  return {
    scene,
    camera: lookAt([-3, -2, 4.5], { bearing: -80, rise: 42, distance: 46, roll: -4, blur: 1.9 }),
    light: shopLight(random),
  };
};

export const bridgeClose: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const fit = fittings(order.body);
  const spot = placed({ x: -fit.saddleX, z: 0.2 });
  addAll(scene, order, spot);
  addDriver(scene, placed({ x: 9, y: 10.5, z: TOP - 0.2, turnZ: 196 }), '#7a2f2a');
  return {
    scene,
    camera: lookAt([-0.4, 0.4, 5.6], { bearing: -122, rise: 36, distance: 23, roll: -4, blur: 2.4 }),
    light: shopLight(random),
  };
};

export const nutStrings: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const fit = fittings(order.body);
  const spot = placed({ x: -nutX(fit), z: -1.2 });
  addAll(scene, order, spot);
  scene.add(moved(block(7, 6.4, 3, 0.6), {}), plain('#3b3f44', 0.85, 0.2), placed({ x: -6, z: 0 }));
  return {
    scene,
    camera: lookAt([0.6, 0, 4.4], {
      bearing: -38 + between(random, -6, 6),
      rise: 32,
      distance: 22,
      roll: 4,
      blur: 2.3,
    }),
    light: shopLight(random),
  };
};

export const setUpGauge: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  const fit = fittings(order.body);
  const spot = placed({ x: -fretX(fit, 12), z: 0.2 });
  addAll(scene, order, spot);
  const rule = placed({ x: -1.2, y: -2.75, z: BOARD_TOP - 0.1, turnX: 90 });
  scene.add(moved(block(2.2, 8, 0.09, 0.02), { y: 3.9 }), plain('#aeb2b5', 0.3, 0.08), rule);
  const ticks = Array.from({ length: 24 }, (_, index) =>
    moved(block(index % 4 === 0 ? 1.1 : 0.6, 0.045, 0.02, 0.004), {
      x: 0.5 - (index % 4 === 0 ? 0 : -0.25),
      y: 0.2 + index * 0.3,
      z: 0.1,
    }),
  );
  scene.add(joined(...ticks), plain('#141516'), rule, false);
  for (const [index, turn] of [18, 34, 52].entries())
    scene.add(
      moved(block(10, 1.2, 0.05, 0.01, 0.5), { x: 5 }),
      metal('#d2d4d6', 0.2, 0.3),
      placed({ x: 4, y: -9, z: 0.4 + index * 0.12, turnZ: turn }),
    );
  scene.add(
    slab({ outline: circle(1), bottom: 0, top: 0.9, round: 0.2, cell: 0.4 }),
    brass(),
    placed({ x: 4.3, y: -8.8, z: 0.1 }),
  );
  return {
    scene,
    camera: lookAt([-0.4, -1, 5.8], { bearing: -112, rise: 28, distance: 26, roll: 3, blur: 2.2 }),
    light: shopLight(random),
  };
};

export const intonation: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#41494c'));
  const spot = placed({ x: -12, z: 0.2, turnZ: between(random, -4, 6) });
  addAll(scene, order, spot);
  addMeter(scene, placed({ x: -6, y: -25, z: 0, turnZ: 8 }), `${435 + (order.seed % 9)}.${order.seed % 10}`, false);
  scene.add(
    slab({ outline: circle(4.4, 30), bottom: 0, top: 0.5, round: 0.4, cell: 1 }),
    cloth('#7c3f36'),
    placed({ x: 14, y: -22 }),
  );
  addRule(scene, placed({ x: 8, y: -17, turnZ: -4 }), 15);
  return {
    scene,
    camera: lookAt([-7, -7, 4], { bearing: -92, rise: 46, distance: 64, roll: -3, blur: 1.7 }),
    light: shopLight(random),
  };
};

/** The bridge and its parts laid out before they go on. */
export const partsLaidOut: Subject = (order, random) => {
  const scene = stageOn(cloth('#4e5f6b'));
  const count = fittings(order.body).strings;
  const { plate, saddles } = bridge(count);
  const spot = placed({ x: -8, y: 3, z: 0.1, turnZ: between(random, -12, 12) });
  scene.add(plate, nickel(), spot);
  scene.add(saddles, steel(), spot);
  const parts = pickup(count);
  for (const [x, y] of [
    [4.6, 7.6],
    [6.4, 0.6],
  ] as const) {
    const place = placed({ x, y, turnZ: between(random, 70, 110) });
    scene.add(parts.cover, plain('#17181a', 0.3, 0.06), place);
    scene.add(parts.poles, steel(), place);
  }
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
  for (let index = 0; index < count; index++) {
    const place = placed({ x: index * 3.4 - 10, y: -6.6 + between(random, -0.4, 0.4), turnZ: between(random, -8, 8) });
    scene.add(
      joined(
        post,
        moved(slab({ outline: circle(0.9), bottom: -0, top: 0.55, round: 0.25, cell: 0.4 }), { y: -2.4 }),
        tube(
          [
            [0, -0.4, 0.3],
            [0, -1.8, 0.3],
          ],
          0.2,
        ),
      ),
      nickel(),
      place,
    );
  }
  return {
    scene,
    camera: lookAt([-0.5, 0.6, 0.5], { bearing: -94, rise: 54, distance: 40, roll: 5, blur: 1.7 }),
    light: shopLight(random),
  };
};
