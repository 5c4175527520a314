import { addBody, addNeck, ARCH, bare } from '../assembly';
import { brownBench, darkBench, ground, lookAt, paleBench, rubberMat, shopLight, stageOn } from '../bench';
import { BODY_TOP, bodyOutline, NECK_POCKET, PICKUP_HOLES, soundHoles } from '../bodies';
import { lineAlong } from '../marks';
import { outlineInset } from '../outline';
import { moved, placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import type { Subject } from '../shot';
import { clear, drawn, dusty, plain, rawWood } from '../surfaces';
import { addClamp, addPencil, addRule, addSandingBlock, addShavings, addTape } from '../tools';

export const neckPocket: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const spot = placed({ x: -8, y: 0, turnZ: between(random, 14, 26) });
  addBody(scene, order, bare(order), spot);
  addNeck(scene, order, within(spot, placed({ x: 5.5, y: -0.4, z: 1.6, turnY: -3 })), { nutted: false });
  addShavings(scene, random, placed({ x: 12, y: -13 }), 8, 6);
  addPencil(scene, placed({ x: -4, y: -19, turnZ: 8 }));
  scene.add(ground(60), dusty('#e0c99f', 0.55, 0.15), placed({ z: 0.03 }));
  return {
    scene,
    camera: lookAt([4, 2, 5], { bearing: -48, rise: 34, distance: 46, roll: 3, blur: 2 }),
    light: shopLight(random),
  };
};

export const sandedBody: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#454b50'));
  const spot = placed({ x: 2, turnZ: between(random, 148, 166) });
  addBody(scene, order, bare(order), spot);
  addSandingBlock(
    scene,
    within(spot, placed({ x: -11, y: 4.4, z: BODY_TOP + ARCH + 0.02, turnZ: 212 })),
    'P220',
    '#7b4a36',
  );
  const lines = Array.from({ length: 5 }, (_, row) =>
    lineAlong(
      Array.from(
        { length: 30 },
        (_, index) => [index * 0.7 - 14 + row, row * 2.4 - 11 + Math.sin(index * 0.9 + row) * 1.1] as const,
      ),
      BODY_TOP + ARCH + 0.03,
      0.16,
    ),
  );
  for (const line of lines.slice(0, 2)) scene.add(line, drawn('#5b5f69', 0.45, 10), spot);
  const powdered = {
    outline: outlineInset(bodyOutline(order.body), 1.6),
    holes: [NECK_POCKET, ...(order.body === 'hollow' ? soundHoles() : PICKUP_HOLES)],
  };
  scene.add(
    slab({ ...powdered, bottom: 0, top: 0.01 }),
    dusty('#f0dfbd', 0.6, 0.25),
    within(spot, placed({ z: BODY_TOP + ARCH })),
  );
  scene.add(ground(80), dusty('#d9c49a', 0.5, 0.1), placed({ z: 0.03 }));
  return {
    scene,
    camera: lookAt([0, -1, 3], { bearing: -84, rise: 50, distance: 68, roll: -4, blur: 1.7 }),
    light: shopLight(random),
  };
};

export const neckFitted: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  const spot = placed({ x: -22, y: 0, z: 0.2, turnZ: between(random, -4, 4) });
  addBody(scene, order, bare(order), spot);
  addNeck(scene, order, spot, { nutted: false });
  const caul = within(spot, placed({ x: 9, z: 6.3 }));
  scene.add(block(7, 6.4, 1.8, 0.2), rawWood({ species: 'ash', offset: 3 }, 0.3), caul);
  addClamp(scene, within(spot, placed({ x: 9, z: 0, turnZ: 180 })), 8.1, 19);
  addRule(scene, within(spot, placed({ x: 14, y: -3.9, z: 5.9, turnZ: 2 })), 24);
  return {
    scene,
    camera: lookAt([-8, -1, 5], { bearing: -72, rise: 40, distance: 68, roll: 3, blur: 1.8 }),
    light: shopLight(random),
  };
};

export const rakingLight: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const spot = placed({ turnZ: between(random, 70, 84) });
  addBody(scene, order, bare(order), spot);
  const light = shopLight(random, 'lamp');
  const low = {
    ...light,
    key: [-0.94, 0.12, 0.26] as const,
    keyColour: [2.6, 1.95, 1.25] as const,
    sky: [0.07, 0.085, 0.12] as const,
    bounce: [0.03, 0.025, 0.02] as const,
  };
  const damp = clear('#6d5234', 0.35, 0.5);
  scene.add(
    block(9, 5, 0.02, 0.01, 2.3),
    damp,
    within(spot, placed({ x: -12, y: 4, z: BODY_TOP + ARCH + 0.02, turnZ: 20 })),
  );
  return {
    scene,
    camera: lookAt([0, 0, 3], { bearing: -90, rise: 60, distance: 76, roll: 2 }),
    light: low,
    stops: 0.25,
  };
};

export const maskedBody: Subject = (order, random) => {
  const scene = stageOn(brownBench(), 12);
  const spot = placed({ turnZ: between(random, 96, 112) });
  addBody(scene, order, bare(order), spot);
  const tape = plain('#4a86b5', 0.6, 0.14);
  const top = BODY_TOP + 0.42;
  scene.add(block(9.6, 6.6, 0.05, 0.01, 0.1), tape, within(spot, placed({ x: 9, z: top, turnY: 2 })));
  for (const x of [1.2, -6.4]) {
    scene.add(
      block(2.5, 10.4, 0.05, 0.01, 0.1),
      tape,
      within(spot, placed({ x: x - 1, y: 0.3, z: BODY_TOP + ARCH + 0.02, turnZ: between(random, -3, 3) })),
    );
    scene.add(
      block(2.5, 10, 0.05, 0.01, 0.1),
      tape,
      within(spot, placed({ x: x + 1, y: -0.2, z: BODY_TOP + ARCH + 0.06, turnZ: between(random, -3, 3) })),
    );
  }
  const rim = outlineInset(bodyOutline(order.body), 1);
  scene.add(lineAlong([...rim, ...rim.slice(0, 1)], BODY_TOP + 0.06, 0.24), plain('#e4d7b4', 0.5, 0.06), spot, false);
  addTape(scene, placed({ x: 25, y: -14 }), '#4a86b5');
  scene.add(moved(block(1.2, 15, 0.05, 0.01), {}), tape, placed({ x: 29, y: 6, turnZ: 20 }));
  return {
    scene,
    camera: lookAt([2, -1, 3], { bearing: -90, rise: 60, distance: 78, roll: -3 }),
    light: shopLight(random),
    tall: random() < 0.5,
  };
};
