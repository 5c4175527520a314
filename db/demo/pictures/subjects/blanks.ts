import { brownBench, darkBench, lookAt, paleBench, rubberMat, shopLight, stageOn } from '../bench';
import { bodyOutline } from '../bodies';
import { tube } from '../loft';
import { lineAlong } from '../marks';
import { type Vec3 } from '../mesh';
import { roundedRect, shifted } from '../outline';
import { moved, placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import { backCut, type Subject, topCut } from '../shot';
import { clear, drawn, rawWood } from '../surfaces';
import { addClamp, addPencil, addRule, addShavings, addTape } from '../tools';
import type { Figure } from '../wood';

export const bookmatchedTop: Subject = (order, random) => {
  const scene = stageOn(darkBench(), 90);
  const figure: Figure = order.woodTone === 'mahogany' ? 'flame' : 'quilt';
  const species = order.woodTone === 'walnut' ? 'walnut' : 'maple';
  const cut = { species, figure: species === 'walnut' ? 'flame' : figure, offset: order.seed % 17 } as const;
  for (const side of [1, -1]) {
    const leaf = slab({
      outline: shifted(roundedRect(54, 19.6, 0.2), 0, side * 9.8),
      bottom: 0,
      top: 0.9,
      round: 0.06,
      cell: 4,
    });
    const pose = placed({
      y: side * 0.12,
      z: side > 0 ? 0 : 0.1,
      turnX: side * 0.8,
      turnZ: 90 - side * 0.5 + between(random, -0.6, 0.6),
    });
    scene.add(leaf, rawWood({ ...cut, bookmatched: true }), pose);
  }
  addPencil(scene, placed({ x: 13, y: -17, z: 1, turnZ: 118 }));
  addRule(scene, placed({ x: -31, y: -26, turnZ: 82 }));
  addTape(scene, placed({ x: 27, y: 15 }));
  return {
    scene,
    camera: lookAt([0, -1, 0], { bearing: -90, rise: 66, distance: 88, roll: between(random, -4, 4) }),
    light: shopLight(random),
    tall: true,
  };
};

export const tracedBlank: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  const spot = placed({ turnZ: between(random, 4, 12) });
  const reach = order.body === 'bass' ? 56 : 50;
  scene.add(
    moved(block(reach, order.body === 'hollow' ? 42 : 36, 4.5, 0.15), { x: order.body === 'bass' ? 3.5 : -1.5 }),
    rawWood(backCut(order), 0.12),
    spot,
  );
  const outline = bodyOutline(order.body);
  const first = outline[0] ?? [0, 0];
  scene.add(lineAlong([...outline, first], 4.52, 0.22), drawn('#2e2a2a', 0.85, 12), spot);
  scene.add(
    lineAlong(
      Array.from({ length: 60 }, (_, index) => [index * 0.85 - 25, 0] as const),
      4.52,
      0.12,
    ),
    drawn('#2e2a2a', 0.6, 12),
    spot,
  );
  addPencil(scene, within(spot, placed({ x: 12, y: 12.4, z: 4.55, turnZ: 38 })));
  addRule(scene, within(spot, placed({ x: -18, y: 0.2, z: 4.55, turnZ: -3 })));
  addTape(scene, placed({ x: -31, y: -21 }), '#3f74a0');
  addShavings(scene, random, placed({ x: 24, y: -24 }), 10, 8);
  return {
    scene,
    camera: lookAt([0, -1, 3], { bearing: -88, rise: 56, distance: 80, roll: 2 }),
    light: shopLight(random),
  };
};

export const clampedNeckBlank: Subject = (order, random) => {
  const scene = stageOn(paleBench());
  const layers = ['maple', 'walnut', 'maple', 'mahogany', 'maple'] as const;
  const widths = [2.4, 0.6, 2.6, 0.6, 2.4];
  let y = -4.3;
  layers.forEach((species, index) => {
    const width = widths[index] ?? 1;
    scene.add(
      block(96, width, 5.6, 0.04),
      rawWood({ species, offset: index * 3 + (order.seed % 9) }),
      placed({ y: y + width / 2 }),
    );
    y += width + 0.02;
  });
  for (const side of [-1, 1])
    scene.add(block(92, 3, 4.4, 0.2), rawWood({ species: 'spruce', offset: 6 }, 0.6), placed({ y: side * 6.2 }));
  const grips = ['#a33a24', '#a33a24', '#c07f2a', '#a33a24', '#35618a'];
  grips.forEach((grip, index) => {
    const pose = placed({
      x: index * 15 - 33 + between(random, -2, 2),
      y: between(random, -0.6, 0.6),
      turnZ: between(random, -5, 5),
    });
    addClamp(scene, pose, 5.7, 11, grip);
  });
  const squeeze = clear('#e8d9ae', 0.7, 0.8);
  for (let x = -46; x < 46; x += between(random, 2, 6)) {
    const path: Vec3[] = [
      [x, -1.9, 5.62],
      [x + between(random, 0.8, 2.4), -1.88, 5.62],
    ];
    scene.add(tube(path, between(random, 0.08, 0.2), 8), squeeze, placed({}));
  }
  return {
    scene,
    camera: lookAt([-3, 0, 7], { bearing: -112, rise: 42, distance: 74, roll: -5, blur: 1.8 }),
    light: shopLight(random),
  };
};

export const glueUp: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#2f3a35'));
  scene.add(block(54, 40, 4.4, 0.1), rawWood(backCut(order), 0.08), placed({}));
  const top = slab({ outline: roundedRect(54, 39.6, 0.15), bottom: 4.42, top: 5.3, round: 0.05, cell: 5 });
  scene.add(top, rawWood(topCut(order)), placed({ y: 0.2 }));
  for (const x of [-17, 0, 17])
    scene.add(
      block(6, 46, 3.8, 0.3),
      rawWood({ species: 'ash', offset: x }, 0.5),
      placed({ x: x + between(random, -1, 1), z: 5.3 }),
    );
  for (const x of [-17, 0, 17])
    for (const side of [-1, 1])
      addClamp(scene, placed({ x, y: side * 14.5, turnZ: side > 0 ? 0 : 180 }), 9.2, 12, '#8f3a26');
  return {
    scene,
    camera: lookAt([0, 0, 7], { bearing: -68, rise: 40, distance: 102, roll: 3 }),
    light: shopLight(random),
    tall: false,
  };
};
