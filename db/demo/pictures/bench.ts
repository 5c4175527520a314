import type { Camera } from './camera';
import type { Light } from './light';
import { block } from './slab';
import { linear, type Material, tint } from './material';
import { addVertex, emptyMesh, type Mesh } from './mesh';
import { cloud, noise3, smooth } from './noise';
import { placed } from './placing';
import { between, pick, type Random } from './random';
import { plain, solid } from './surfaces';
import { Scene } from './scene';
import { paintWood, type Species } from './wood';

/** A plane on z = 0 in cells small enough that one behind the camera can be left out. */
export function ground(half: number, cells = 40): Mesh {
  const mesh = emptyMesh();
  const step = (2 * half) / cells;
  for (let row = 0; row <= cells; row++)
    for (let column = 0; column <= cells; column++)
      addVertex(mesh, [column * step - half, row * step - half, 0], [0, 0, 1]);
  for (let row = 0; row < cells; row++)
    for (let column = 0; column < cells; column++) {
      const a = row * (cells + 1) + column;
      mesh.indices.push(a, a + 1, a + cells + 2, a, a + cells + 2, a + cells + 1);
    }
  return mesh;
}

/** A bench top of planks, stained and scratched by work. */
export const plankTop = (species: Species, stainHex: string, stain: number, width = 13): Material => {
  const colour = linear(stainHex);
  return solid((sample) => {
    const plank = Math.floor(sample.y / width);
    const across = sample.y - plank * width;
    const seam = smooth(0, 0.16, Math.min(across, width - across));
    sample.y = across - width / 2;
    sample.x += plank * 61.7;
    sample.z += plank * 3.3;
    paintWood(sample, { species, offset: plank * 1.7 + 4 });
    const grain = (sample.r + sample.g + sample.b) / 1.2;
    const wear = noise3(sample.x * 0.07, sample.y * 0.08, plank);
    const scratch =
      smooth(0.8, 0.9, noise3(sample.x * 0.5 + sample.y * 4, sample.y * 0.9, 30)) * smooth(0.5, 0.8, wear);
    const blot = smooth(0.62, 0.75, cloud(sample.x * 0.13, sample.y * 0.13, plank + 9));
    for (const part of ['r', 'g', 'b'] as const) {
      const target = colour[part === 'r' ? 0 : part === 'g' ? 1 : 2] * (0.35 + grain * 1.2);
      sample[part] = (sample[part] + (target - sample[part]) * stain) * (0.82 + 0.36 * wear) * (1 - 0.3 * blot);
      sample[part] = sample[part] * (1 + scratch * 0.6) * (0.22 + 0.78 * seam);
    }
    sample.rough = 0.5 + 0.2 * wear;
    sample.bumpX = scratch * 0.1;
  });
};

/** Painted block wall, plaster or board, seen flat. */
export const rough = (hex: string, unevenness = 0.2): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    const broad = cloud(sample.x * 0.04, sample.y * 0.04, 3) - 0.5;
    const fine = cloud(sample.x * 1.3, sample.y * 1.3, 8) - 0.5;
    tint(sample, colour, 1 + (broad + fine * 0.7) * unevenness * 2);
    sample.bumpX = fine * unevenness;
    sample.bumpY = (noise3(sample.x * 1.4 + 50, sample.y * 1.4, 2) - 0.5) * unevenness;
    sample.rough = 0.8;
  });
};

/** Cast-iron machine table: planed lines, oil stains, slots. */
export const ironTable = (): Material =>
  solid((sample) => {
    const line = noise3(sample.x * 0.3, sample.y * 14, 2) - 0.5;
    const stain = cloud(sample.x * 0.09, sample.y * 0.09, 5);
    const slot = Math.abs(((sample.y + 400) % 16) - 8);
    const gap = smooth(0.7, 0.85, slot);
    tint(sample, [0.2, 0.21, 0.215], (0.7 + stain * 0.6 + line * 0.25) * (0.12 + 0.88 * gap));
    sample.rough = 0.42 + stain * 0.2;
    sample.metal = 0.35 * gap;
    sample.bumpY = line * 0.14;
  });

/** Rubber bench mat with a fine tread and sanding dust in it. */
export const rubberMat = (hex: string): Material => {
  const colour = linear(hex);
  return solid((sample) => {
    const tread = noise3(sample.x * 4, sample.y * 4, 2) - 0.5;
    const dust = smooth(0.45, 0.8, cloud(sample.x * 0.08, sample.y * 0.08, 6));
    tint(sample, colour, 1 + tread * 0.5);
    sample.r += dust * 0.035;
    sample.g += dust * 0.031;
    sample.b += dust * 0.025;
    sample.bumpX = tread * 0.3;
    sample.bumpY = (noise3(sample.x * 4, sample.y * 4, 11) - 0.5) * 0.3;
    sample.rough = 0.75;
  });
};

export const darkBench = () => plankTop('ash', '#383330', 0.95);
export const brownBench = () => plankTop('walnut', '#6a4a32', 0.5, 17);
export const paleBench = () => plankTop('maple', '#b78f5f', 0.45, 9);

/** A new stage with a wide surface at z = 0. */
export function stageOn(surface: Material, turnZ = 0): Scene {
  const scene = new Scene();
  scene.add(ground(170), surface, placed({ turnZ }), false);
  return scene;
}

const turnedBy = (radians: number) => ({ cos: Math.cos(radians), sin: Math.sin(radians) });

/** Light from the upper left, as every bench in the shop has its window there. */
export function shopLight(random: Random, mood: 'day' | 'lamp' | 'booth' = 'day'): Light {
  const turn = between(random, -0.35, 0.35);
  const power = mood === 'booth' ? 8 : 6.5;
  const warm = mood === 'lamp';
  return {
    key: [-0.66 + turn * 0.2, 0.2 + turn * 0.4, 0.72],
    keyColour: warm ? [1.75, 1.42, 1.02] : mood === 'booth' ? [1.3, 1.36, 1.45] : [1.55, 1.43, 1.25],
    spread: mood === 'booth' ? 0.32 : 0.2,
    sky: warm ? [0.2, 0.2, 0.22] : [0.24, 0.27, 0.31],
    bounce: warm ? [0.08, 0.06, 0.04] : [0.085, 0.072, 0.06],
    panels: [
      { x: -0.25, y: 0.75, halfX: 1.3, halfY: 0.12, ...turnedBy(turn), power },
      { x: 0.15, y: -0.35, halfX: 1.3, halfY: 0.1, ...turnedBy(turn + 0.05), power: power * 0.8 },
      { x: -0.2, y: 2.1, halfX: 1.1, halfY: 0.17, ...turnedBy(turn * 0.4), power: power * 0.6 },
    ],
  };
}

type View = {
  bearing?: number;
  rise?: number;
  distance: number;
  view?: number;
  roll?: number;
  blur?: number;
  focus?: number;
};

/** A camera that looks at a spot from a bearing (degrees), a height angle and a distance (cm). */
export function lookAt(
  target: readonly [number, number, number],
  { bearing = -90, rise = 55, distance, view = 38, roll = 0, blur = 1.4, focus }: View,
): Camera {
  const [b, e] = [(bearing * Math.PI) / 180, (rise * Math.PI) / 180];
  return {
    eye: [
      target[0] + distance * Math.cos(e) * Math.cos(b),
      target[1] + distance * Math.cos(e) * Math.sin(b),
      target[2] + distance * Math.sin(e),
    ],
    target,
    view,
    roll,
    blur,
    focus: focus ?? distance,
  };
}

/** The far side of the shop: shelves and boxes that the lens leaves soft. */
export function addFarShop(scene: Scene, random: Random, distance = 130) {
  const wall = rough('#4b4a46', 0.25);
  scene.add(ground(220, 4), wall, placed({ turnX: 90, y: distance + 30 }), false);
  for (let shelf = 0; shelf < 4; shelf++) {
    const z = shelf * 24 + 4;
    scene.add(block(320, 26, 2, 0.3), plain('#7a5f43', 0.7), placed({ y: distance + 12, z: z - 2 }), false);
    for (let x = -150; x < 150;) {
      const width = between(random, 6, 22);
      const hex = pick(random, '#8d5a35', '#c9b48c', '#37434b', '#a33d2a', '#5d6b58', '#d9d2c0', '#28292c');
      scene.add(
        block(width - 1, 18, between(random, 7, 19), 0.4),
        plain(hex),
        placed({ x, y: distance + 12, z }),
        false,
      );
      x += width + between(random, 0, 8);
    }
  }
}
