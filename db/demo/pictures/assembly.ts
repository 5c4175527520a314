import { bodyMeshes, BODY_TOP, controlSpots } from './bodies';
import {
  BOARD_TOP,
  bridge,
  dots,
  fingerboard,
  fittings,
  frets,
  headstock,
  knob,
  neckShaft,
  nut,
  nutX,
  pickup,
  slots,
  strings,
  tuners,
} from './instrument';
import type { Material } from './material';
import { placed, type Placing, within } from './placing';
import type { Scene } from './scene';
import { backCut, type PictureOrder, topCut } from './shot';
import { blackMetal, coated, nickel, pearl, plain, rawWood, steel } from './surfaces';

export type BodyLook = { top: Material; back: Material };

/** The body's materials in the order's finish. */
export function finished(order: PictureOrder, gloss = 1): BodyLook {
  const rim = { hex: order.finish.edgeHex ?? order.finish.hex };
  return {
    top: coated({ cut: topCut(order), colour: order.finish, gloss }),
    back: coated({ cut: backCut(order), colour: rim, gloss, reach: 2 }),
  };
}

/** The body's materials before any colour. */
export const bare = (order: PictureOrder): BodyLook => ({
  top: rawWood(topCut(order)),
  back: rawWood(backCut(order)),
});

export const ARCH = 0.55;

export function addBody(scene: Scene, order: PictureOrder, look: BodyLook, spot: Placing, pickups = true, arch = ARCH) {
  const [lower, upper] = bodyMeshes(order.body, { pocket: true, pickups: pickups && order.body !== 'hollow' }, arch);
  if (lower) scene.add(lower, look.back, spot);
  if (upper) scene.add(upper, look.top, spot);
}

export type NeckLook = { fretted?: boolean; slotted?: boolean; marked?: boolean; head?: Material; nutted?: boolean };

/** Neck, board and headstock in the body's space, so that they meet the pocket. */
export function addNeck(scene: Scene, order: PictureOrder, spot: Placing, look: NeckLook) {
  const fit = fittings(order.body);
  const underBoard = within(spot, placed({ z: BOARD_TOP - 0.6 }));
  const wood = rawWood({ species: 'maple', offset: (order.seed % 11) + 3 });
  scene.add(neckShaft(fit), wood, underBoard);
  const board = rawWood({ species: order.seed % 2 === 0 ? 'rosewood' : 'ebony', offset: order.seed % 7 });
  scene.add(fingerboard(fit), board, underBoard);
  if (look.slotted) scene.add(slots(fit), plain('#0b0807'), underBoard, false);
  if (look.marked !== false) scene.add(dots(fit), pearl(), underBoard, false);
  if (look.fretted !== false) scene.add(frets(fit), nickel(), underBoard);
  if (look.nutted !== false) scene.add(nut(fit), plain('#e6dcc4', 0.35, 0.05), underBoard);
  const tilt = within(underBoard, placed({ x: nutX(fit) + 0.4, z: 0.02, turnY: 8 }));
  scene.add(headstock(), look.head ?? wood, tilt);
}

/** Pick-ups, bridge, knobs, tuners and strings. */
export function addHardware(scene: Scene, order: PictureOrder, spot: Placing, strung = true) {
  const fit = fittings(order.body);
  const top = BODY_TOP + ARCH;
  const [cover, poles] = [plain('#17181a', 0.32, 0.06), steel()];
  for (const x of [1.2, -6.4]) {
    const parts = pickup(fit.strings);
    const place = within(spot, placed({ x, z: top - 1 }));
    scene.add(parts.cover, cover, place);
    scene.add(parts.poles, poles, place);
  }
  const dark = order.seed % 3 === 0 ? blackMetal() : nickel();
  const parts = bridge(fit.strings);
  const saddle = within(spot, placed({ x: fit.saddleX, z: top }));
  scene.add(parts.plate, dark, saddle);
  scene.add(parts.saddles, steel(), saddle);
  for (const [x, y] of controlSpots(order.body)) scene.add(knob(), dark, within(spot, placed({ x, y, z: top - 0.1 })));
  addTuners(scene, order, spot, dark);
  if (!strung) return;
  const underBoard = within(spot, placed({ z: BOARD_TOP - 0.6 }));
  scene.add(strings(fit, top + 1.15 - (BOARD_TOP - 0.6)), steel(), underBoard);
}

export function addTuners(scene: Scene, order: PictureOrder, spot: Placing, material: Material) {
  const fit = fittings(order.body);
  const tilt = within(spot, placed({ x: nutX(fit) + 0.4, z: BOARD_TOP - 0.58, turnY: 8 }));
  const { posts, keys } = tuners(fit.strings);
  scene.add(posts, material, tilt);
  scene.add(keys, material, tilt);
}

/** Everything, strung and ready. */
export function addInstrument(scene: Scene, order: PictureOrder, spot: Placing) {
  const look = finished(order);
  addBody(scene, order, look, spot);
  addNeck(scene, order, spot, { head: look.top });
  addHardware(scene, order, spot);
}
