import type { Rgb } from './material';
import { smooth } from './noise';
import { type Vec3 } from './mesh';

/** A bright panel overhead: its middle and half sizes on a ceiling one unit up, and the way it is turned. */
export type Panel = { x: number; y: number; halfX: number; halfY: number; cos: number; sin: number; power: number };

export type Light = {
  /** Towards the key light. */
  key: Vec3;
  keyColour: Rgb;
  /** Width of the key light: how fast shadows soften with distance. */
  spread: number;
  sky: Rgb;
  bounce: Rgb;
  panels: readonly Panel[];
};

/** What a mirror would show in a direction: dim shop, ceiling panels and a tall window on the left. */
export function surroundings(light: Light, dx: number, dy: number, dz: number, rough: number): number {
  const blur = 0.03 + rough * 0.9;
  let seen = 0.17 + 0.2 * smooth(-0.1, 1, dz) + 0.16 / (1 + 24 * dz * dz);
  if (dz > 0.08) for (const panel of light.panels) seen += panelShare(panel, dx / dz, dy / dz, blur);
  if (dx < -0.12) seen += windowShare(dy / -dx, dz / -dx, blur);
  return seen;
}

function panelShare(panel: Panel, px: number, py: number, blur: number): number {
  const ox = px - panel.x;
  const oy = py - panel.y;
  const along = Math.abs(ox * panel.cos + oy * panel.sin);
  const across = Math.abs(oy * panel.cos - ox * panel.sin);
  if (along > panel.halfX + blur || across > panel.halfY + blur) return 0;
  const inX = 1 - smooth(panel.halfX - blur, panel.halfX + blur, along);
  const inY = 1 - smooth(panel.halfY - blur, panel.halfY + blur, across);
  return (panel.power * inX * inY * panel.halfY) / (panel.halfY + blur * 0.6);
}

function windowShare(side: number, height: number, blur: number): number {
  const inside =
    (1 - smooth(0.55 - blur, 0.55 + blur, Math.abs(side))) * smooth(0.22 - blur * 0.6, 0.22 + blur * 0.6, height);
  const below = 1 - smooth(1.35 - blur, 1.35 + blur, height);
  const bar = smooth(0, 0.03 + blur, Math.abs(side)) * smooth(0, 0.03 + blur, Math.abs(height - 0.8));
  return 1.5 * inside * below * (0.25 + 0.75 * bar);
}
