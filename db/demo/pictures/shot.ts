import type { BodyKind } from './bodies';
import type { Camera } from './camera';
import { develop } from './develop';
import type { Light } from './light';
import { mulberry32, type Random } from './random';
import { expose } from './render';
import type { Scene } from './scene';
import type { Colour } from './surfaces';
import { dot, subtract, unit } from './mesh';
import type { Cut, WoodTone } from './wood';

export type PictureOrder = {
  finish: Colour;
  woodTone: WoodTone;
  body: BodyKind;
  /** Same seed, same bytes. */
  seed: number;
  /** Longer side of the picture; 1600 when left out. */
  widthPx?: number;
};

/** A set stage: what stands where, how it is lit and from where it is taken. */
export type Shot = {
  scene: Scene;
  camera: Camera;
  light: Light;
  tall?: boolean;
  stops?: number;
  warmth?: number;
};

export type Subject = (order: PictureOrder, random: Random) => Shot;

/** Drawn smaller and enlarged: a phone's picture is no sharper, and it takes half the time. */
const DRAWN_SHARE = 0.66;

export async function take(subject: Subject, order: PictureOrder): Promise<Buffer> {
  const random = mulberry32(order.seed);
  const shot = subject(order, random);
  const long = order.widthPx ?? 1600;
  const short = Math.round(long * 0.75);
  const [width, height] = shot.tall ? [short, long] : [long, short];
  const { camera, light } = shot;
  const exposure = expose(shot.scene, camera, light, Math.round(width * DRAWN_SHARE), Math.round(height * DRAWN_SHARE));
  const ahead = unit(subtract(camera.target, camera.eye));
  const focus = camera.focus ?? dot(subtract(camera.target, camera.eye), ahead);
  return develop(
    exposure,
    { width, height, focus, blur: camera.blur ?? 1, stops: shot.stops ?? 0, warmth: shot.warmth ?? 0.03 },
    random,
  );
}

/** The top of this order's body: figured maple over most woods, mirrored about the centre. */
export const topCut = (order: PictureOrder): Cut => ({
  species: order.woodTone === 'maple' || order.woodTone === 'mahogany' ? 'maple' : order.woodTone,
  figure: order.woodTone === 'maple' ? 'quilt' : order.woodTone === 'mahogany' ? 'flame' : 'plain',
  bookmatched: order.body !== 'bass',
  offset: order.seed % 17,
});

export const backCut = (order: PictureOrder): Cut => ({ species: order.woodTone, offset: (order.seed % 23) + 2 });
