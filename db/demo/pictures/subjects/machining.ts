import { ground, ironTable, lookAt, paleBench, rough, rubberMat, shopLight, stageOn } from '../bench';
import {
  archOf,
  bodyMeshes,
  BODY_TOP,
  bodyOutline,
  CONTROL_CAVITY,
  NECK_POCKET,
  PICKUP_HOLES,
  soundHoles,
} from '../bodies';
import { turning } from '../loft';
import type { Material } from '../material';
import { noise3 } from '../noise';
import { type Point, roundedRect, shifted } from '../outline';
import { placed, within } from '../placing';
import { between, type Random } from '../random';
import type { Scene } from '../scene';
import { block, slab } from '../slab';
import { backCut, type Subject, topCut } from '../shot';
import { blackMetal, dusty, metal, plain, rawWood, solid, steel } from '../surfaces';
import { addFile, addShavings } from '../tools';
import { type Cut, paintWood } from '../wood';

/** The ridges a round cutter leaves, one path beside the next along the body. */
function cutterMarks(cut: Cut, pitch: number): Material {
  return solid((sample) => {
    paintWood(sample, cut);
    const turn = sample.y / pitch + 0.15 * Math.sin(sample.x * 0.2);
    const ridge = (turn - Math.floor(turn)) * 2 - 1;
    const chatter = noise3(sample.x * 7, Math.floor(turn) * 3, 1) - 0.5;
    sample.bumpY += ridge * 0.34;
    sample.bumpX += chatter * 0.1;
    const groove = 0.86 + 0.2 * (1 - ridge * ridge);
    sample.r *= groove;
    sample.g *= groove;
    sample.b *= groove;
  });
}

/** Fine chips and dust lying in patches on a body and around it. */
function addChips(
  scene: Scene,
  random: Random,
  spot: ReturnType<typeof placed>,
  hex: string,
  count: number,
  reach: number,
  z: number,
) {
  const chip = plain(hex, 0.9, 0.3);
  const flake = block(0.5, 0.26, 0.05, 0.02);
  for (let index = 0; index < count; index++) {
    const [far, bearing] = [Math.sqrt(random()) * reach, random() * 6.28];
    const pose = {
      x: far * Math.cos(bearing),
      y: far * Math.sin(bearing),
      z,
      turnZ: random() * 360,
      turnX: between(random, -30, 30),
      turnY: between(random, -30, 30),
    };
    scene.add(flake, chip, within(spot, placed(pose)));
  }
}

export const carvedBody: Subject = (order, random) => {
  const scene = stageOn(ironTable());
  const spot = placed({ z: 1.2, turnZ: between(random, 58, 74) });
  const [lower, upper] = bodyMeshes(order.body, {}, 1.5);
  if (lower) scene.add(lower, rawWood(backCut(order), 0.15), spot);
  if (upper) scene.add(upper, cutterMarks(topCut(order), 0.62), spot);
  scene.add(block(34, 26, 1.2, 0.1), rawWood({ species: 'spruce', offset: 2 }, 0.3), spot);
  addChips(scene, random, placed({ x: 6, y: -22 }), '#cfae7c', 240, 34, 0.1);
  addChips(scene, random, placed({ x: -2, y: 2 }), '#dcc194', 90, 13, 7.1);
  addSpindle(scene, 15, 12, 8.5);
  return {
    scene,
    camera: lookAt([0, -1, 3], { bearing: -94, rise: 46, distance: 80, roll: -2 }),
    light: shopLight(random),
    tall: false,
  };
};

/** Router spindle above a place, its cutter's tip at `z`. */
function addSpindle(scene: Scene, x: number, y: number, z: number) {
  const spot = placed({ x, y, z });
  scene.add(
    turning(
      [
        [0.1, 0],
        [0.4, 0.3],
        [0.4, 3.4],
        [0.62, 3.6],
        [0.62, 5.4],
      ],
      16,
    ),
    steel(),
    spot,
  );
  scene.add(
    turning(
      [
        [1.2, 5],
        [1.9, 5.8],
        [1.9, 8],
        [1.5, 8.4],
        [2.6, 9],
        [2.6, 10],
      ],
      6,
    ),
    blackMetal(),
    spot,
  );
  scene.add(
    turning(
      [
        [3.4, 10],
        [4.4, 10.6],
        [4.4, 26],
      ],
      30,
    ),
    metal('#aeb4b8', 0.3, 0.8),
    spot,
  );
}

export const routedCavities: Subject = (order, random) => {
  const scene = stageOn(rough('#8a6e4b', 0.12));
  const spot = placed({ z: 0.1, turnZ: between(random, 170, 188) });
  const outline = bodyOutline(order.body);
  const cut = backCut(order);
  scene.add(slab({ outline, bottom: 0, top: 1.4, cell: 2 }), rawWood(cut), spot);
  const holes: Point[][] = [
    CONTROL_CAVITY,
    ...PICKUP_HOLES,
    [...NECK_POCKET],
    shifted(roundedRect(7, 3.4, 0.8), -13, 5),
  ];
  scene.add(slab({ outline, holes, bottom: 1.39, top: 4.4, round: 0.5, cell: 0.42 }), rawWood(cut), spot);
  scene.add(ground(70), dusty('#e3cfa4', 0.75, 0.11), placed({ z: 0.03 }));
  addChips(scene, random, placed({ x: 12, y: -10 }), '#b98a5a', 160, 26, 4.45);
  addSpindle(scene, 12.5, 8.5, 2.4);
  return {
    scene,
    camera: lookAt([3, 1, 3], { bearing: -64, rise: 44, distance: 62, roll: 3, blur: 1.7 }),
    light: shopLight(random),
  };
};

export const chambers: Subject = (order, random) => {
  const scene = stageOn(paleBench(), 20);
  const spot = placed({ x: -8, y: 4, turnZ: between(random, 82, 98) });
  const outline = bodyOutline(order.body);
  const inner = (side: number): Point[] =>
    outline.filter(([x, y]) => y * side > 4.6 && x < 12).map(([x, y]): Point => [x * 0.84 - 0.6, y * 0.8 + side * 0.4]);
  scene.add(slab({ outline, bottom: 0, top: 0.7, cell: 2 }), rawWood(backCut(order)), spot);
  scene.add(
    slab({ outline, holes: [inner(1), inner(-1)], bottom: 0.69, top: 4.2, round: 0.1, cell: 0.5 }),
    rawWood(backCut(order)),
    spot,
  );
  const cap = slab({
    outline,
    holes: order.body === 'hollow' ? soundHoles() : [],
    bottom: 0,
    top: 0.8,
    round: 0.2,
    cell: 0.5,
  });
  scene.add(cap, rawWood(topCut(order)), placed({ x: 31, y: -2, z: 1.6, turnX: 4, turnZ: 102 }));
  scene.add(block(3, 30, 1.4, 0.1), rawWood({ species: 'spruce' }), placed({ x: 27 }));
  addShavings(scene, random, placed({ x: -30, y: -22 }), 12, 8);
  return {
    scene,
    camera: lookAt([9, 0, 2], { bearing: -92, rise: 60, distance: 98, roll: -3 }),
    light: shopLight(random),
  };
};

export const soundHoleEdge: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#3d4136'));
  const outline = bodyOutline('hollow');
  const spot = placed({ z: 0.2, turnZ: 20 });
  scene.add(slab({ outline, bottom: 0, top: 0.6, cell: 3 }), rawWood({ ...backCut(order), species: 'spruce' }), spot);
  const arch = archOf('hollow', 1.6);
  scene.add(
    slab({ outline, holes: soundHoles(), bottom: 2.4, top: BODY_TOP, round: 0.5, cell: 0.35, arch }),
    rawWood(topCut(order)),
    spot,
  );
  addFile(scene, within(spot, placed({ x: -1, y: 3.2, z: BODY_TOP + 1.62, turnZ: 160 })), 13);
  addChips(scene, random, placed({ x: -4, y: 8 }), '#d9bd8c', 70, 9, 6.1);
  return {
    scene,
    camera: lookAt([-8, 7, 5], { bearing: -78, rise: 42, distance: 40, roll: 4, blur: 2 }),
    light: shopLight(random, 'lamp'),
  };
};
