import { addBody, finished } from '../assembly';
import { brownBench, darkBench, lookAt, paleBench, rough, shopLight, stageOn } from '../bench';
import { tube, turning } from '../loft';
import { joined, type Vec3 } from '../mesh';
import { roundedRect } from '../outline';
import { moved, placed, type Placing, within } from '../placing';
import { between, pick, type Random } from '../random';
import type { Scene } from '../scene';
import { block, slab } from '../slab';
import { backCut, type PictureOrder, type Subject, topCut } from '../shot';
import { blackMetal, coated, film, metal, nickel, plain, rawWood, steel } from '../surfaces';
import { addTape } from '../tools';
import { blend, linear, tint } from '../material';
import { cloud, smooth } from '../noise';
import type { WoodTone } from '../wood';

/** Finishes of the shop's other builds, for bodies that share a rack. */
const neighbours = (random: Random): PictureOrder['finish'] =>
  pick(
    random,
    { hex: '#b8452a', edgeHex: '#3a100c' },
    { hex: '#c98a2c', edgeHex: '#4a2008' },
    { hex: '#35507a' },
    { hex: '#e4d9bd' },
    { hex: '#5d7d3a', edgeHex: '#1f2f14' },
    { hex: '#26282c' },
    { hex: '#6d3b78', edgeHex: '#241030' },
    { hex: '#8f1f2d' },
  );

export const bodyInColour: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const spot = placed({ turnZ: between(random, 76, 104), z: 0.3 });
  addBody(scene, order, finished(order), spot);
  return {
    scene,
    camera: lookAt([1, 0, 2], { rise: 62, distance: 80, bearing: -90, roll: between(random, -5, 5) }),
    light: shopLight(random),
  };
};

export const colourSamples: Subject = (order, random) => {
  const scene = stageOn(paleBench(), 6);
  for (let index = 0; index < 5; index++) {
    const pose = placed({
      x: index * 9.4 - 18,
      y: between(random, -1, 1),
      z: 0.02,
      turnZ: 90 + between(random, -3, 3),
    });
    const cut = { ...topCut(order), bookmatched: false, offset: index + (order.seed % 7) };
    const material = coated({
      cut,
      colour: order.finish,
      strength: index / 4,
      gloss: index > 2 ? 1 : 0.25,
      reach: 2.4,
    });
    const strip = slab({ outline: roundedRect(27, 8, 0.3), bottom: 0, top: 1, round: 0.12, cell: 0.7, arch: () => 0 });
    scene.add(strip, index === 0 ? rawWood(cut) : material, pose);
  }
  for (const [x, hex] of [
    [-14, order.finish.hex],
    [-4, order.finish.edgeHex ?? order.finish.hex],
    [7, '#d9a441'],
  ] as const) {
    scene.add(
      turning(
        [
          [2.6, 0],
          [2.8, 0.3],
          [2.8, 5.4],
          [2.6, 5.8],
          [2.4, 5.5],
        ],
        30,
      ),
      plain('#e9eaea', 0.25, 0.03),
      placed({ x, y: 22 }),
    );
    scene.add(
      turning(
        [
          [2.36, 5.5],
          [2.3, 5.53],
          [0, 5.53],
        ],
        30,
      ),
      coated({ cut: backCut(order), colour: { hex }, gloss: 1 }),
      placed({ x, y: 22 }),
    );
  }
  const rag = slab({
    outline: roundedRect(14, 11, 3),
    bottom: 0,
    top: 0.4,
    round: 0.3,
    cell: 0.6,
    arch: (_, x, y) => 1.3 * cloud(x * 0.4, y * 0.4, 3),
  });
  scene.add(rag, plain('#c9c2b4', 0.95, 0.25), placed({ x: 21, y: 21, turnZ: 20 }));
  return {
    scene,
    camera: lookAt([0, 2, 0], { bearing: -95, rise: 52, distance: 80, roll: 4, blur: 1.7 }),
    light: shopLight(random),
  };
};

function addSprayGun(scene: Scene, spot: Placing) {
  const shell = metal('#c4c8cc', 0.22, 0.2);
  const barrel = moved(
    turning(
      [
        [0.5, -3],
        [0.9, -2.4],
        [1.2, -1.4],
        [1.2, 2],
        [1.5, 3],
        [1.6, 7],
        [1.1, 8],
        [0, 8],
      ],
      22,
    ),
    { turnY: -90 },
  );
  const handle = tube(
    [
      [-5.6, 0, 0],
      [-6.2, -2.5, 0],
      [-7.6, -9, 0],
    ],
    1.15,
    14,
  );
  const cup = moved(
    turning(
      [
        [1, 0],
        [1.2, 2],
        [3.4, 3],
        [3.6, 8.5],
        [3.2, 9],
      ],
      28,
    ),
    { x: -3, z: 1, turnX: -14 },
  );
  const trigger = tube(
    [
      [-3, -0.6, 0],
      [-3.6, -3, 0],
      [-4.6, -5, 0],
    ],
    0.32,
    8,
  );
  scene.add(joined(barrel, handle), shell, spot);
  scene.add(trigger, blackMetal(), spot);
  scene.add(cup, plain('#d7d9d6', 0.3, 0.05), spot);
  const hose = Array.from({ length: 24 }, (_, index): Vec3 => [
    -7.6 - index * 0.7,
    -9 - index * 1.5,
    2.4 * Math.sin(index * 0.25),
  ]);
  scene.add(tube(hose, 0.6, 10), plain('#2a2c2e', 0.5), spot);
}

/** A fan of mist from the gun's tip at the origin towards +x, `length` cm. */
function addMist(scene: Scene, spot: Placing, hex: string, length: number) {
  const colour = linear(hex);
  const mist = film((sample) => {
    const far = sample.x / length;
    const side = Math.abs(sample.y) / (0.6 + sample.x * 0.3);
    const wisp = cloud(sample.x * 0.22, sample.y * 0.4, 3);
    tint(sample, colour, 1.1);
    blend(sample, [0.9, 0.92, 0.94], 0.42);
    sample.rough = 1;
    sample.opacity = 1.05 * smooth(1, 0, side) * (1 - smooth(0.05, 1, far)) * (0.5 + 0.7 * wisp);
  });
  scene.add(moved(block(length, length * 0.8, 0.01, 0.001), { x: length / 2 }), mist, spot);
}

export const burstSpray: Subject = (order, random) => {
  const scene = stageOn(rough('#8b9396', 0.1));
  const spot = placed({ x: -9, y: 1, z: 8, turnZ: between(random, 96, 112) });
  const look = finished(order, 0.55);
  addBody(scene, order, look, spot);
  scene.add(
    turning(
      [
        [9, 0],
        [9, 0.6],
        [2, 1],
        [2, 8],
      ],
      36,
    ),
    plain('#6a6f72', 0.6, 0.15),
    placed({ x: -9, y: -2 }),
  );
  const gun = placed({ x: 15, y: -8, z: 17, turnX: -52, turnY: 10, turnZ: 150 });
  addSprayGun(scene, gun);
  addMist(scene, within(gun, placed({ x: 3.2, turnX: 52 })), order.finish.hex, 21);
  return {
    scene,
    camera: lookAt([3, -1, 8], { bearing: -92, rise: 54, distance: 84, roll: -3 }),
    light: shopLight(random, 'booth'),
  };
};

/** A body on a hook, its face to the camera; the wall is z = 0 and up is +y. */
function addHanging(scene: Scene, order: PictureOrder, x: number, gloss: number, sway: number) {
  const spot = within(placed({ x, y: 4, z: 11 }), placed({ turnZ: 90 + sway, turnX: sway }));
  addBody(scene, order, finished(order, gloss), spot);
  const hook = Array.from({ length: 16 }, (_, index): Vec3 => [
    x + Math.sin(index * 0.4) * (index > 10 ? 0.8 : 0.1),
    40 - index * 1.8,
    13,
  ]);
  scene.add(tube(hook, 0.22, 8), steel(), placed({}));
}

export const hangingBodies: Subject = (order, random) => {
  const scene = stageOn(rough('#a7a9a2', 0.12));
  scene.add(
    tube(
      [
        [-110, 40, 13],
        [110, 40, 13],
      ],
      1.1,
      14,
    ),
    nickel(),
    placed({}),
  );
  const kinds = ['solid', 'bass', 'solid', 'hollow'] as const;
  for (const place of [-2, -1, 0, 1, 2]) {
    const mine = place === 0;
    const other = {
      ...order,
      body: kinds[(place + 2) % 4] ?? 'solid',
      seed: order.seed + place * 7 + 40,
      finish: neighbours(random),
    };
    addHanging(
      scene,
      mine ? order : other,
      place * 39 + (mine ? 0 : between(random, -2, 2)),
      0.9,
      between(random, -4, 4),
    );
  }
  return {
    scene,
    camera: lookAt([-3, 5, 12], { bearing: -100, rise: 74, distance: 118, roll: 1, blur: 1.3 }),
    light: shopLight(random, 'booth'),
  };
};

export const rackOfBodies: Subject = (order, random) => {
  const scene = stageOn(rough('#55524c', 0.2));
  const timber = rawWood({ species: 'spruce', offset: 7 }, 0.3);
  for (const x of [-46, 46]) scene.add(block(6, 48, 4, 0.3), timber, placed({ x, y: 8 }));
  for (const y of [-10, 14]) scene.add(block(98, 4, 4, 0.3), timber, placed({ y, z: 4 }));
  for (let place = 0; place < 6; place++) {
    const mine = place === 1;
    const shown = mine
      ? order
      : {
          ...order,
          finish: neighbours(random),
          seed: order.seed + place * 5,
          woodTone: pick<WoodTone>(random, 'maple', 'mahogany', 'ash'),
        };
    const spot = within(placed({ x: place * 16 - 40, y: 4, z: 26 }), placed({ turnY: -62 + between(random, -2, 2) }));
    addBody(
      scene,
      { ...shown, body: mine ? order.body : 'solid' },
      finished(shown, 0.8),
      within(spot, placed({ turnZ: 90 })),
    );
  }
  return {
    scene,
    camera: lookAt([-4, 2, 22], { bearing: -128, rise: 34, distance: 112, roll: -2, blur: 1.5 }),
    light: shopLight(random, 'booth'),
  };
};

export const clearCoats: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const spot = placed({ x: 4, y: 4, z: 5, turnZ: between(random, 30, 48) });
  addBody(scene, order, finished(order), spot);
  for (const [x, y] of [
    [-6, -6],
    [12, 8],
    [-4, 12],
  ] as const)
    scene.add(
      turning(
        [
          [2.2, 0],
          [2, 0.4],
          [0.3, 5],
          [0, 5],
        ],
        18,
      ),
      plain('#c8862a', 0.5),
      placed({ x, y }),
    );
  addTape(scene, placed({ x: -19, y: -11 }), '#cdb877');
  return {
    scene,
    camera: lookAt([0, -2, 9], { bearing: -76, rise: 24, distance: 48, roll: 4, blur: 2.2, focus: 44 }),
    light: shopLight(random, 'booth'),
  };
};
