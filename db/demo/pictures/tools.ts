import { stripe, tube, turning } from './loft';
import { joined, type Vec3 } from './mesh';
import { written } from './marks';
import { circle, roundedRect } from './outline';
import { moved, placed, type Placing, within } from './placing';
import { between, type Random } from './random';
import type { Scene } from './scene';
import { block, slab } from './slab';
import { blackMetal, clear, film, glowing, metal, plain, rawWood, solid, steel } from './surfaces';
import { linear, tint } from './material';
import { noise3 } from './noise';

/** A screw clamp that presses down at the origin from `height`; its bar stands `reach` behind. */
export function addClamp(scene: Scene, spot: Placing, height: number, reach: number, grip = '#a33a24') {
  const iron = plain('#59636b', 0.42, 0.1);
  const bar = joined(
    moved(block(0.9, 2.2, height + 9, 0.15), { y: reach, z: -2 }),
    moved(block(2, reach + 3, 2.2, 0.4), { y: reach / 2, z: height + 3.4 }),
    moved(block(2.4, 3.4, 3.2, 0.4), { y: reach, z: height + 2.9 }),
  );
  const thread = tube(
    [
      [0, 0, height + 0.6],
      [0, 0, height + 8.6],
    ],
    (t) => 0.5 + 0.06 * (Math.round(t * 30) % 2),
    12,
  );
  const handle = turning(
    [
      [0.7, height + 8.4],
      [1.35, height + 9],
      [1.5, height + 12],
      [1.3, height + 15.4],
      [0.8, height + 16],
      [0, height + 16],
    ],
    14,
  );
  const pad = turning(
    [
      [1.5, height],
      [1.5, height + 0.5],
      [0.9, height + 1],
      [0, height + 1],
    ],
    20,
  );
  scene.add(bar, iron, spot);
  scene.add(joined(thread, pad), steel(), spot);
  scene.add(handle, plain(grip, 0.38, 0.06), spot);
}

/** Straight rule with fine divisions, lying along x from the origin. */
export function addRule(scene: Scene, spot: Placing, length = 30) {
  scene.add(moved(block(length, 2.6, 0.1, 0.03), { x: length / 2 }), metal('#b9bcc0', 0.3, 0.8), spot);
  const ticks = Array.from({ length: length * 2 - 1 }, (_, index) => {
    const x = (index + 1) / 2;
    const long = index % 10 === 9 ? 1.1 : index % 2 === 1 ? 0.75 : 0.45;
    return stripe(
      [
        [x, 1.25, 0.11],
        [x, 1.25 - long, 0.11],
      ],
      0.045,
    );
  });
  scene.add(joined(...ticks), plain('#17181a'), spot, false);
}

export function addPencil(scene: Scene, spot: Placing) {
  const wood = moved(
    turning(
      [
        [0.02, -2],
        [0.12, -1.6],
        [0.36, 0],
        [0.36, 0.05],
      ],
      6,
    ),
    { turnY: 90, z: 0.36 },
  );
  const shaft = moved(
    turning(
      [
        [0.36, 0],
        [0.36, 13],
        [0, 13],
      ],
      6,
    ),
    { turnY: 90, z: 0.36 },
  );
  scene.add(wood, rawWood({ species: 'spruce' }), spot);
  scene.add(shaft, plain('#b5402c', 0.35, 0.04), spot);
}

/** A flat file: ribbed steel and a turned handle, along x. */
export function addFile(scene: Scene, spot: Placing, length = 22) {
  const base = linear('#8d9094');
  const cut = solid((sample) => {
    const seen = Math.min(1, 0.03 / sample.footprint);
    const tooth = (noise3((sample.x + sample.y) * 9, (sample.x - sample.y) * 2, 1) - 0.5) * seen;
    tint(sample, base, 0.9 + tooth * 0.5);
    sample.metal = 0.8;
    sample.rough = 0.42;
    sample.bumpX = tooth * 0.3;
  });
  scene.add(moved(block(length, 2.6, 0.55, 0.06), { x: length / 2 }), cut, spot);
  const handle = turning(
    [
      [0.5, 0],
      [0.85, 0.6],
      [0.8, 1.4],
      [1.15, 4],
      [1.3, 7],
      [1.1, 10],
      [0.6, 11],
      [0, 11],
    ],
    18,
  );
  scene.add(moved(handle, { turnY: -90, z: 0.9 }), rawWood({ species: 'walnut', offset: 2 }), spot);
  scene.add(
    moved(
      turning(
        [
          [0.62, 0],
          [0.62, 1.2],
        ],
        16,
      ),
      { turnY: -90, x: 0.6, z: 0.7 },
    ),
    metal('#c9a45a', 0.25),
    spot,
  );
}

/** A rubber or cork sanding block with paper round it and its grade stencilled on. */
export function addSandingBlock(scene: Scene, spot: Placing, grade: string, paper = '#3b3d40') {
  scene.add(block(11, 6.4, 3.2, 0.35), plain(paper, 0.8, 0.4), spot);
  scene.add(moved(block(11.2, 5.2, 0.5, 0.2), { z: 3.1 }), plain('#565b60', 0.6, 0.15), spot);
  const label = moved(written(grade, 0.85, 0.24, 0), { x: -grade.length * 0.7, y: -0.85, z: 3.63 });
  scene.add(label, clear('#d8dadb', 0.82, 0), spot);
}

/** A hand-held meter of no particular make: dark shell, lit panel, figures, two keys. */
export function addMeter(scene: Scene, spot: Placing, reading: string, pins = true) {
  scene.add(
    slab({ outline: roundedRect(6.4, 14, 1.4), bottom: 0, top: 2.6, round: 0.7, cell: 2 }),
    plain('#2b3136', 0.45, 0.1),
    spot,
  );
  scene.add(
    moved(slab({ outline: roundedRect(6.5, 3.6, 0.6), bottom: 0, top: 2.7, round: 0.6 }), { y: -5.4 }),
    plain('#c8862a', 0.5, 0.08),
    spot,
  );
  scene.add(
    moved(slab({ outline: roundedRect(4.8, 4, 0.3), bottom: 2.5, top: 2.64, round: 0.03 }), { y: 3 }),
    glowing('#8fa88c', 0.28),
    spot,
  );
  const size = Math.min(0.78, 2.6 / reading.length);
  const figures = moved(written(reading, size, size * 0.27, 0.06), {
    x: -reading.length * size * 0.8,
    y: 3 - size,
    z: 2.66,
  });
  scene.add(figures, plain('#10180f', 0.5, 0.02), spot, false);
  for (const x of [-1.3, 1.3])
    scene.add(
      moved(slab({ outline: circle(0.75), bottom: 2.4, top: 2.85, round: 0.2, cell: 0.5 }), { x, y: -1.4 }),
      plain('#8b9298', 0.4),
      spot,
    );
  if (!pins) return;
  for (const x of [-1.2, 1.2])
    scene.add(
      tube(
        [
          [x, 6.8, 1.3],
          [x, 8.2, 1.3],
          [x, 9, 1],
        ],
        (t) => 0.16 - 0.12 * t,
      ),
      steel(),
      spot,
    );
}

/** A roll of masking tape lying flat. */
export function addTape(scene: Scene, spot: Placing, hex = '#c9b06a') {
  const ring = slab({
    outline: circle(4.6, 40),
    holes: [circle(3.4, 36)],
    bottom: 0,
    top: 2.4,
    round: 0.12,
    cell: 0.5,
  });
  scene.add(ring, plain(hex, 0.6, 0.1), spot);
}

/** Curled shavings or chips strewn about the origin. */
export function addShavings(
  scene: Scene,
  random: Random,
  spot: Placing,
  count: number,
  spread: number,
  species: 'maple' | 'mahogany' = 'maple',
) {
  const material = rawWood({ species, offset: 5 });
  for (let index = 0; index < count; index++) {
    const [width, radius, turns] = [between(random, 0.4, 1.1), between(random, 0.35, 0.9), between(random, 0.8, 1.9)];
    const curl = Array.from({ length: 16 }, (_, step): [Vec3, Vec3] => {
      const angle = (step / 15) * turns * 6.28;
      const r = radius * (0.6 + 0.4 * (step / 15));
      const [a, b] = [r * Math.cos(angle), r + r * Math.sin(angle)];
      const drift = step * 0.03;
      return [
        [a + drift, -width / 2 + drift, b],
        [a + drift, width / 2 + drift, b],
      ];
    });
    const sheet = stripe(
      curl.map(([start]) => start),
      width,
    );
    const ribbon = { ...sheet, positions: [...curl.map(([, end]) => end), ...curl.map(([start]) => start)].flat() };
    ribbon.normals = [...curl, ...curl].flatMap((_, step) => {
      const angle = ((step % 16) / 15) * turns * 6.28;
      return [Math.cos(angle), 0, Math.sin(angle)];
    });
    const [far, bearing] = [Math.sqrt(random()) * spread, random() * 6.28];
    const pose = { x: far * Math.cos(bearing), y: far * Math.sin(bearing), turnZ: random() * 360 };
    scene.add(ribbon, material, within(spot, placed(pose)));
  }
}

/** Round drops of water standing on a surface at height `z`. */
export function addDrops(
  scene: Scene,
  random: Random,
  spot: Placing,
  count: number,
  halfX: number,
  halfY: number,
  z: number,
) {
  const water = film((sample) => {
    tint(sample, [0.5, 0.58, 0.6]);
    sample.coat = 1;
    sample.coatRough = 0.03;
    sample.opacity = 0.1 + 0.6 * (1 - Math.max(0, sample.facing)) ** 2;
  });
  const glint = clear('#ffffff', 0.9, 1);
  const spark = slab({ outline: circle(1, 8), bottom: 0, top: 0.01 });
  const drop = turning(
    [
      [1, 0],
      [0.94, 0.18],
      [0.75, 0.36],
      [0.42, 0.48],
      [0.15, 0.52],
      [0, 0.52],
    ],
    12,
  );
  const shade = clear('#05090a', 0.5, 0);
  for (let index = 0; index < count; index++) {
    const size = 0.08 + 0.42 * random() ** 3;
    const [x, y] = [between(random, -halfX, halfX), between(random, -halfY, halfY)];
    const scaled = { ...drop, positions: drop.positions.map((value) => value * size) };
    scene.add(
      moved(slab({ outline: circle(size * 1.15, 12), bottom: 0, top: 0.01, cell: 1 }), { x: 0.1 * size }),
      shade,
      within(spot, placed({ x: x + size * 0.25, y: y - size * 0.2, z: z - 0.02 })),
    );
    scene.add(scaled, water, within(spot, placed({ x, y, z })));
    const shine = { ...spark, positions: spark.positions.map((value) => value * size * 0.15) };
    scene.add(shine, glint, within(spot, placed({ x: x + size * 0.3, y: y + size * 0.25, z: z + size * 0.5 })));
  }
}

/** Screwdriver with a clear coloured handle, along x. */
export function addDriver(scene: Scene, spot: Placing, hex = '#b8862f') {
  scene.add(
    tube(
      [
        [0, 0, 1.1],
        [13, 0, 0.5],
      ],
      0.3,
      12,
    ),
    blackMetal(),
    spot,
  );
  const grip = turning(
    [
      [0.6, 0],
      [1.2, 0.8],
      [1.35, 3],
      [1.1, 6],
      [1.3, 9],
      [0.9, 10],
      [0, 10],
    ],
    8,
  );
  scene.add(moved(grip, { turnY: -90, z: 1.25 }), plain(hex, 0.22, 0.05), spot);
}
