import { addBody, ARCH, finished } from '../assembly';
import { addFarShop, brownBench, darkBench, lookAt, rubberMat, shopLight, stageOn } from '../bench';
import { BODY_TOP } from '../bodies';
import { turning } from '../loft';
import { cloud, noise3, smooth } from '../noise';
import { roundedRect, smoothLoop } from '../outline';
import { placed, within } from '../placing';
import { between } from '../random';
import { block, slab } from '../slab';
import type { Subject } from '../shot';
import { cloth, film, plain, solid, steel } from '../surfaces';
import { tint } from '../material';
import { addDrops, addSandingBlock } from '../tools';

const TOP = BODY_TOP + ARCH;

/** Grey slurry that the block leaves in arcs on a wet, dulled face. */
const slurry = film((sample) => {
  const sweep = Math.sin(Math.hypot(sample.x + 12, sample.y - 16) * 2.4 + cloud(sample.x * 0.2, sample.y * 0.2, 2) * 3);
  const patch = smooth(0.35, 0.7, cloud(sample.x * 0.12, sample.y * 0.12, 9));
  tint(sample, [0.55, 0.58, 0.58]);
  sample.rough = 0.5;
  sample.opacity = (0.1 + 0.28 * smooth(-0.4, 0.9, sweep)) * patch * smooth(0, 3.5, sample.edge);
});

export const wetSanding: Subject = (order, random) => {
  const scene = stageOn(darkBench());
  const spot = placed({ x: 6, y: 1, turnZ: between(random, 154, 174) });
  addBody(scene, order, finished(order, 0.55), spot, false);
  scene.add(block(23, 19, 0.02), slurry, within(spot, placed({ x: -8, z: TOP + 0.01 })));
  addSandingBlock(scene, within(spot, placed({ x: -8, y: 1, z: TOP, turnZ: 196 })), 'P1500');
  addDrops(scene, random, within(spot, placed({ x: -7 })), 120, 9, 8, TOP + 0.01);
  return {
    scene,
    camera: lookAt([10, -2, 5], { bearing: -92, rise: 48, distance: 44, roll: -4, blur: 1.9 }),
    light: shopLight(random),
  };
};

/** Loose cotton discs of a buffing wheel, seen from the rim. */
const mop = solid((sample) => {
  const leaf = noise3(sample.x * 0.6, sample.y * 0.6, sample.z * 7) - 0.5;
  const streak = noise3(Math.atan2(sample.y, sample.x) * 24, 1, sample.z * 2) - 0.5;
  tint(sample, [0.62, 0.55, 0.43], 0.85 + leaf * 0.7 + streak * 0.35);
  sample.rough = 0.95;
  sample.bumpX = leaf * 0.6;
});

export const buffing: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#3a3c3e'));
  addFarShop(scene, random, 90);
  const wheel = turning(
    [
      [3, -3],
      [14, -3.4],
      [15.2, -2.4],
      [15.4, 0],
      [15.2, 2.4],
      [14, 3.4],
      [3, 3],
    ],
    60,
  );
  const axle = placed({ x: -10, y: 16, z: 27, turnX: 90, turnZ: 64 });
  scene.add(wheel, mop, axle);
  scene.add(
    turning(
      [
        [3.2, -3.6],
        [3.2, 3.6],
      ],
      26,
    ),
    steel(),
    axle,
  );
  scene.add(
    turning(
      [
        [1.4, -34],
        [1.4, 34],
      ],
      20,
    ),
    steel(),
    axle,
  );
  const body = within(placed({ x: 6, y: -2, z: 15 }), placed({ turnX: 48, turnZ: 24 }));
  addBody(scene, order, finished(order), within(body, placed({ turnZ: between(random, 80, 100) })));
  return {
    scene,
    camera: lookAt([2, 2, 19], { bearing: -82, rise: 28, distance: 84, roll: 3, blur: 1.7, focus: 80 }),
    light: shopLight(random),
  };
};

export const buffedShine: Subject = (order, random) => {
  const scene = stageOn(brownBench());
  addFarShop(scene, random, 120);
  const spot = placed({ x: 0, y: 4, z: 0.6, turnZ: between(random, 60, 84) });
  addBody(scene, order, finished(order), spot);
  const rag = slab({
    outline: smoothLoop([
      [-9, -5.5],
      [-4, -7],
      [1, -5.6],
      [6, -7.4],
      [8.6, -4.6],
      [7.4, 0],
      [9.4, 4.4],
      [4.4, 6.6],
      [0, 5.4],
      [-5.4, 7.4],
      [-9, 5],
      [-7.6, 0],
    ]),
    bottom: 0,
    top: 0.16,
    round: 0.14,
    cell: 0.5,
    arch: (depth, x, y) =>
      smooth(0, 2.4, depth) *
      (0.2 + 1.5 * Math.abs(Math.sin(x * 0.42 + y * 0.2 + cloud(x * 0.16, y * 0.16, order.seed % 9) * 7))),
  });
  scene.add(rag, cloth('#b8955a'), within(spot, placed({ x: -15.5, y: -2, z: TOP - 0.3, turnZ: 30 })));
  return {
    scene,
    camera: lookAt([0, 1, 4], { bearing: -98, rise: 27, distance: 66, roll: -2, blur: 1.8, focus: 60 }),
    light: shopLight(random),
  };
};

export const levelledClear: Subject = (order, random) => {
  const scene = stageOn(rubberMat('#4b5558'));
  const spot = placed({ x: -2, y: 3, z: 0.4, turnZ: between(random, 96, 120) });
  addBody(scene, order, finished(order, 0.18), spot);
  for (const [index, grade] of ['P800', 'P1200', 'P2000'].entries()) {
    const paper = slab({
      outline: roundedRect(13, 9, 0.1),
      bottom: 0,
      top: 0.06,
      cell: 0.8,
      arch: (_, x) => 0.004 * x * x,
    });
    const pose = placed({ x: index * 12 - 13, y: -24 + index, turnZ: between(random, -14, 14) });
    scene.add(paper, plain(['#5b4a3e', '#3e4347', '#2c2e31'][index] ?? '#333333', 0.9, 0.5), pose);
    scene.add(
      block(4.2, 1.6, 0.04, 0.01),
      plain('#d8d5cc', 0.7),
      within(pose, placed({ z: 0.08, x: grade.length * 0.1 })),
      false,
    );
  }
  return {
    scene,
    camera: lookAt([-1, -5, 2], { bearing: -88, rise: 54, distance: 82, roll: 3 }),
    light: shopLight(random),
    tall: true,
  };
};
