import { addFarShop, brownBench, darkBench, ground, lookAt, rough, rubberMat, shopLight, stageOn } from '../bench';
import { written } from '../marks';
import { blend, linear, type Material } from '../material';
import { type Mesh } from '../mesh';
import { cloud, noise3, smooth } from '../noise';
import type { Point } from '../outline';
import { moved, placed, within } from '../placing';
import { between, type Random } from '../random';
import { block, slab } from '../slab';
import type { Subject } from '../shot';
import { drawn, dusty, plain, rawWood, solid, steel } from '../surfaces';
import { addMeter, addPencil, addRule, addShavings } from '../tools';
import { type Cut, type WoodTone } from '../wood';

/** A board as it left the log: straight ends, wandering sides. Its end is at x = 0. */
function flitch(random: Random, length: number, width: number, thickness: number): Mesh {
  const start = random() * 50;
  const side = (sign: number, x: number): Point => [
    x,
    sign *
      (width / 2 + (noise3(x * 0.06 + start, sign * 4, 1) - 0.5) * 3.2 + (noise3(x * 0.3, sign, start) - 0.5) * 0.9),
  ];
  const places = Array.from({ length: 41 }, (_, index) => (-index / 40) * length);
  const outline = [...places.map((x) => side(1, x)), ...places.reverse().map((x) => side(-1, x))];
  return slab({ outline, bottom: 0, top: thickness, round: 0.12, cell: 0.9 });
}

/** Sawn boards keep a strip of bark and pale sapwood along their sides. */
function flitchWood(cut: Cut, width: number): Material {
  const bark = linear('#5b4736');
  const crack = linear('#1d1510');
  const sap = linear('#d8be93');
  const sawn = rawWood(cut, 0.8);
  return solid((sample) => {
    sawn.paint(sample);
    const out = Math.abs(sample.y) + (noise3(sample.x * 0.2, sample.y > 0 ? 1 : 9, 2) - 0.5) * 2;
    blend(sample, sap, 0.45 * smooth(width * 0.33, width * 0.42, out));
    const crust = smooth(width * 0.44, width * 0.47, out);
    const plate = smooth(0.36, 0.6, cloud(sample.x * 0.9, sample.y * 2.2, sample.z * 2.4));
    blend(sample, plate > 0.5 ? bark : crack, crust * (0.35 + 0.65 * Math.abs(plate * 2 - 1)));
    sample.bumpX += crust * (plate - 0.5) * 0.5;
    sample.bumpY += crust * (noise3(sample.x * 3, sample.y * 6, sample.z * 6) - 0.5) * 0.6;
  });
}

const chalk = () => drawn('#e9e6dc', 0.9, 7);

export const flitchStack: Subject = (order, random) => {
  const scene = stageOn(rough('#5b574f', 0.25));
  addFarShop(scene, random, 150);
  const width = 25;
  const sticker = rawWood({ species: 'spruce', offset: 3 }, 0.5);
  for (let index = 0; index < 5; index++) {
    const z = index * 6.6 + 3;
    const pose = placed({
      x: between(random, -3, 2),
      y: between(random, -1.5, 1.5),
      z,
      turnZ: between(random, -1.2, 1.2),
    });
    scene.add(
      flitch(random, 130, width + between(random, -2, 3), 4.8),
      flitchWood({ species: order.woodTone, offset: index * 2.3 + (order.seed % 9) }, width),
      pose,
    );
    const end = within(pose, placed({ x: 0.03, y: -5 + between(random, -3, 4), z: 1.1, turnX: 90, turnZ: 90 }));
    scene.add(written(`${(order.seed % 7) + 2}${index + 1}`, 1.5, 0.42), chalk(), end);
    for (const x of [-12, -60, -110]) scene.add(block(2.4, 30, 1.75, 0.1), sticker, placed({ x, z: z - 1.78 }));
  }
  const top = placed({ x: -26, y: -6, z: 34.25, turnZ: 84 });
  scene.add(written(`${10 + (order.seed % 80)}/4`, 2.6, 0.55), chalk(), top);
  addShavings(
    scene,
    random,
    placed({ x: 16, y: -14 }),
    14,
    16,
    order.woodTone === 'maple' || order.woodTone === 'ash' ? 'maple' : 'mahogany',
  );
  return {
    scene,
    camera: lookAt([-14, -1, 17], { bearing: -42, rise: 24, distance: 96, roll: -1.5, blur: 1.6, focus: 84 }),
    light: { ...shopLight(random, 'lamp'), key: [0.42, -0.55, 0.62] },
    stops: 0.1,
  };
};

export const moistureReading: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const board = placed({ x: 42, y: 2, turnZ: between(random, -6, 4) });
  scene.add(flitch(random, 120, 27, 4.4), flitchWood({ species: order.woodTone, offset: order.seed % 13 }, 27), board);
  const reading = `${6 + (order.seed % 3)}.${(order.seed * 7) % 10}`;
  addMeter(scene, placed({ x: 3, y: -3, z: 4.45, turnZ: 18 + between(random, -8, 8) }), reading);
  scene.add(written('7', 2, 0.4), chalk(), within(board, placed({ x: -20, y: 2, z: 4.43 })));
  addPencil(scene, placed({ x: -16, y: -8, z: 4.42, turnZ: 24 }));
  return {
    scene,
    camera: lookAt([2, 0, 5], { bearing: -96, rise: 52, distance: 52, roll: 4, blur: 1.8 }),
    light: shopLight(random),
    tall: random() < 0.5,
  };
};

export const stickeredRack: Subject = (order, random) => {
  const scene = stageOn(rough('#77726a', 0.2));
  addFarShop(scene, random, 190);
  const sticker = rawWood({ species: 'spruce', offset: 3 }, 0.4);
  for (let level = 0; level < 6; level++)
    for (let place = 0; place < 3; place++) {
      const species: WoodTone =
        (level + place) % 4 === 0 ? 'walnut' : (level + place) % 3 === 0 ? 'mahogany' : order.woodTone;
      const pose = placed({
        x: (place - 1) * 25,
        y: between(random, -4, 2),
        z: level * 7 + 4,
        turnZ: 90 + between(random, -1, 1),
      });
      scene.add(
        moved(block(80, 22, 4.6, 0.15), { x: 40 }),
        rawWood({ species, offset: level * 1.9 + place * 3 }, 0.45),
        pose,
      );
    }
  for (let level = 0; level < 6; level++)
    for (const y of [5, 40, 74]) scene.add(block(82, 2.2, 2.2, 0.1), sticker, placed({ y, z: level * 7 + 1.7 }));
  for (const x of [-42, 42]) scene.add(block(5, 5, 60, 0.3), plain('#3d5a63', 0.55, 0.2), placed({ x, y: 10 }));
  const card = within(placed({ x: 3, y: -4.3, z: 25.4 }), placed({ turnX: 90 }));
  scene.add(moved(block(9, 3.6, 0.06, 0.02), { x: 4 }), plain('#e8dfc8', 0.7, 0.08), card);
  scene.add(
    moved(written(`${14 + (order.seed % 60)}-${(order.seed % 8) + 1}`, 0.9, 0.2), { x: 0.8, y: -0.9, z: 0.08 }),
    plain('#2c3e63'),
    card,
    false,
  );
  return {
    scene,
    camera: lookAt([0, 4, 23], { bearing: -68, rise: 13, distance: 98, roll: 1, blur: 1.3, focus: 92 }),
    light: { ...shopLight(random), key: [-0.52, -0.6, 0.55] },
    stops: 0.25,
    tall: random() < 0.4,
  };
};

export const boardOnScale: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#39424a'));
  scene.add(block(24, 22, 4, 1.2), plain('#c9ccca', 0.4, 0.06), placed({ y: -4 }));
  scene.add(block(22, 15, 0.5, 0.2), steel(), placed({ y: -1, z: 4.2 }));
  scene.add(moved(block(9, 3.4, 0.2, 0.1), { z: 4 }), plain('#9db3a0', 0.3, 0.02), placed({ y: -12.6 }));
  const weight = `${(1.6 + (order.seed % 9) * 0.1).toFixed(1)}${order.seed % 10}`;
  scene.add(written(weight, 0.95, 0.24, 0.05), plain('#10170f'), placed({ x: -2.9, y: -13.5, z: 4.22 }), false);
  const blank = placed({ y: 5, z: 4.7, turnZ: between(random, -7, 7) });
  scene.add(block(56, 19, 4.6, 0.12), rawWood({ species: order.woodTone, offset: order.seed % 15 }, 0.12), blank);
  scene.add(
    written(`${order.seed % 90}`, 1.4, 0.22),
    drawn('#3a3f47', 0.7, 11),
    within(blank, placed({ x: 17, y: 4, z: 4.62 })),
  );
  addRule(scene, placed({ x: -20, y: -26, turnZ: 8 }));
  addShavings(scene, random, placed({ x: 24, y: -18 }), 9, 12);
  return {
    scene,
    camera: lookAt([0, -2, 4], { bearing: -84, rise: 48, distance: 76, roll: -3 }),
    light: shopLight(random),
  };
};

export const sampleBoards: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const choices: WoodTone[] = ['maple', 'mahogany', 'ash', 'walnut'];
  const ordered = [order.woodTone, ...choices.filter((tone) => tone !== order.woodTone)];
  ordered.forEach((species, index) => {
    const pose = placed({
      x: index * 13 - 18,
      y: between(random, -2, 2),
      z: index % 2 === 0 ? 0 : 1.2,
      turnZ: 88 + between(random, -7, 7),
    });
    const figure = species === 'maple' ? 'flame' : 'plain';
    scene.add(block(34, 11, 1.9, 0.1), rawWood({ species, figure, offset: index * 2 + (order.seed % 8) }), pose);
  });
  scene.add(block(20, 14, 0.4, 0.05), plain('#d8d2c2', 0.8), placed({ x: 16, y: -22, turnZ: -12 }));
  addPencil(scene, placed({ x: 12, y: -22, z: 0.45, turnZ: 20 }));
  scene.add(ground(70), dusty('#d9c29a', 0.4, 0.12), placed({ z: 0.02 }));
  return {
    scene,
    camera: lookAt([1, -3, 1], { bearing: -94, rise: 62, distance: 74, roll: 5 }),
    light: shopLight(random, 'lamp'),
  };
};
