import type { Subject } from './shot';
import * as blanks from './subjects/blanks';
import * as final from './subjects/final';
import * as finishes from './subjects/finishes';
import * as frets from './subjects/frets';
import * as hardware from './subjects/hardware';
import * as joints from './subjects/joints';
import * as lumber from './subjects/lumber';
import * as machining from './subjects/machining';
import * as necks from './subjects/necks';
import * as polish from './subjects/polish';

export type StageKey =
  | 'lumber'
  | 'wood-room'
  | 'blanks'
  | 'machining'
  | 'neck-board'
  | 'frets'
  | 'body-joint'
  | 'pre-paint'
  | 'colour-clear'
  | 'sand-buff'
  | 'hardware-setup'
  | 'final-check';

export type PictureKind = { kind: string; stage: StageKey; caption: string; alt: string; subject: Subject };

const entry = (stage: StageKey, kind: string, subject: Subject, caption: string, alt: string): PictureKind => ({
  kind,
  stage,
  caption,
  alt,
  subject,
});

export const pictureList: readonly PictureKind[] = [
  entry(
    'lumber',
    'flitch-stack',
    lumber.flitchStack,
    'The stack your boards come from',
    'A stack of sawn boards with bark on their sides, chalk numbers on the ends',
  ),
  entry(
    'lumber',
    'sample-boards',
    lumber.sampleBoards,
    'Four woods side by side',
    'Four short boards of different woods on a bench, a sheet of paper and a pencil beside them',
  ),
  entry(
    'lumber',
    'moisture-reading',
    lumber.moistureReading,
    'Moisture before it goes any further',
    'A moisture meter standing on a rough board, its figures lit',
  ),
  entry(
    'wood-room',
    'stickered-rack',
    lumber.stickeredRack,
    'Resting on stickers',
    'Boards on a rack with thin sticks between the layers and a numbered card',
  ),
  entry(
    'wood-room',
    'board-on-scale',
    lumber.boardOnScale,
    'On the scale',
    'A body board lying across a bench scale that shows its weight',
  ),
  entry(
    'blanks',
    'bookmatched-top',
    blanks.bookmatchedTop,
    'The two leaves, opened',
    'Two leaves of figured wood opened side by side so that the figure mirrors',
  ),
  entry(
    'blanks',
    'glue-up',
    blanks.glueUp,
    'Top going onto the back',
    'A figured top clamped to a body blank under three wooden bars and six clamps',
  ),
  entry(
    'blanks',
    'traced-blank',
    blanks.tracedBlank,
    'Outline drawn',
    'A body blank with the outline and the centre line drawn in pencil',
  ),
  entry(
    'blanks',
    'neck-blank-clamped',
    blanks.clampedNeckBlank,
    'Neck layers in the clamps',
    'A laminated neck blank between two bars with a row of clamps',
  ),
  entry(
    'machining',
    'routed-cavities',
    machining.routedCavities,
    'Cavities cut',
    'A bare body with cavities under a router cutter, dust around it',
  ),
  entry(
    'machining',
    'carved-body',
    machining.carvedBody,
    'Off the carving pass',
    'A carved body with fine cutter marks on a machine table, chips around it',
  ),
  entry(
    'machining',
    'chambers',
    machining.chambers,
    'Hollowed, cap beside it',
    'A body hollowed on both sides of the centre block, its cap leaning beside it',
  ),
  entry(
    'machining',
    'sound-hole-edge',
    machining.soundHoleEdge,
    'Cleaning the opening',
    'Close view of a leaf-shaped opening in a carved top with a file lying across',
  ),
  entry(
    'neck-board',
    'slotted-board',
    necks.slottedBoard,
    'Slots cut',
    'A dark fingerboard with its fret slots cut, a steel rule behind it',
  ),
  entry(
    'neck-board',
    'inlay-dots',
    necks.inlayDots,
    'Dots in',
    'Close view of pearl dots set in a dark fingerboard, loose dots in front',
  ),
  entry(
    'neck-board',
    'board-glued',
    necks.boardGlued,
    'Board glued to the neck',
    'A fingerboard clamped to a neck under a long bar',
  ),
  entry(
    'neck-board',
    'neck-carving',
    necks.neckCarving,
    'Shaping the back of the neck',
    'A drawknife across the back of a figured neck, shavings on the bench',
  ),
  entry(
    'neck-board',
    'headstock-shaped',
    necks.headstockShaped,
    'Headstock to the line',
    'A bare headstock with six holes, a file and shavings beside it',
  ),
  entry(
    'frets',
    'necks-in-row',
    necks.neckBlanksShaped,
    'Next in line for frets',
    'Three necks without frets lying side by side on a bench',
  ),
  entry(
    'frets',
    'fretting',
    frets.fretting,
    'Frets going in',
    'A brass hammer resting on a half-fretted neck, a coil of fret wire in front',
  ),
  entry(
    'frets',
    'fret-levelling',
    frets.fretLevelling,
    'Levelling',
    'A long file lying along the frets, their tops marked with blue ink',
  ),
  entry(
    'frets',
    'fret-polish',
    frets.fretPolish,
    'Taped and polished',
    'Blue tape between frets and a felt pad on the fingerboard',
  ),
  entry('frets', 'fret-ends', frets.fretEnds, 'Fret ends', 'Low close view along the rounded ends of the frets'),
  entry(
    'body-joint',
    'neck-pocket',
    joints.neckPocket,
    'First dry fit',
    'A neck sliding into the pocket of a bare body',
  ),
  entry(
    'body-joint',
    'neck-fitted',
    joints.neckFitted,
    'Neck in, clamp on',
    'A clamp holding a neck in its pocket, a rule along the board',
  ),
  entry(
    'body-joint',
    'sanded-body',
    joints.sandedBody,
    'Body sanded',
    'A bare body covered in fine dust with a sanding block on it',
  ),
  entry(
    'pre-paint',
    'raking-light',
    joints.rakingLight,
    'Under a low lamp',
    'A bare body lit from one side so that every mark would show',
  ),
  entry(
    'pre-paint',
    'masked-body',
    joints.maskedBody,
    'Masked',
    'A bare body with blue tape over the neck pocket and pick-up cavities',
  ),
  entry(
    'colour-clear',
    'colour-samples',
    finishes.colourSamples,
    'Steps to your colour',
    'Five strips of wood from bare to full colour, cups of dye behind them',
  ),
  entry(
    'colour-clear',
    'burst-spray',
    finishes.burstSpray,
    'Edge going on',
    'A spray gun sending a fan of colour over the edge of a body',
  ),
  entry(
    'colour-clear',
    'body-in-colour',
    finishes.bodyInColour,
    'Colour is on',
    'A body in its finish colour on a dark bench',
  ),
  entry(
    'colour-clear',
    'clear-coats',
    finishes.clearCoats,
    'Clear, coat by coat',
    'Low view over a glossy body standing on small cones',
  ),
  entry(
    'colour-clear',
    'hanging-bodies',
    finishes.hangingBodies,
    'Hanging to cure',
    'A row of finished bodies hanging from a rail in the finish room',
  ),
  entry(
    'colour-clear',
    'rack-of-bodies',
    finishes.rackOfBodies,
    'On the rack with the others',
    'Bodies in several finishes standing in a wooden rack',
  ),
  entry(
    'sand-buff',
    'levelled-clear',
    polish.levelledClear,
    'Levelled flat',
    'A dulled body with three sheets of sanding paper in front of it',
  ),
  entry(
    'sand-buff',
    'wet-sanding',
    polish.wetSanding,
    'Wet sanding',
    'A sanding block on a wet body, drops of water and grey slurry around it',
  ),
  entry('sand-buff', 'buffing', polish.buffing, 'At the wheel', 'A glossy body held up to a cotton buffing wheel'),
  entry(
    'sand-buff',
    'buffed-shine',
    polish.buffedShine,
    'Up to a shine',
    'A shining body with the shop lights in it and a yellow cloth on top',
  ),
  entry(
    'hardware-setup',
    'parts-laid-out',
    hardware.partsLaidOut,
    'What goes on it',
    'A bridge, pick-ups and tuners laid out on grey cloth',
  ),
  entry(
    'hardware-setup',
    'control-wiring',
    hardware.controlWiring,
    'Wiring',
    'Coloured wires and two controls in a cavity, a soldering iron above',
  ),
  entry(
    'hardware-setup',
    'pickups-in',
    hardware.pickupsIn,
    'Pick-ups going in',
    'One pick-up in its place and another lifted out on its wires',
  ),
  entry(
    'hardware-setup',
    'bridge-close',
    hardware.bridgeClose,
    'Bridge and saddles',
    'Close view of a bridge with a string over each saddle',
  ),
  entry('hardware-setup', 'nut-strings', hardware.nutStrings, 'Nut slots', 'Close view of strings crossing the nut'),
  entry(
    'hardware-setup',
    'set-up-gauge',
    hardware.setUpGauge,
    'Height at the twelfth',
    'A small rule standing on the fingerboard beside the strings, gauges in front',
  ),
  entry(
    'hardware-setup',
    'intonation',
    hardware.intonation,
    'Tuning it in',
    'A strung instrument with a tuner in front that shows a figure',
  ),
  entry(
    'final-check',
    'on-the-bench',
    final.onTheBench,
    'Last look over it',
    'The finished instrument lying across a dark bench',
  ),
  entry(
    'final-check',
    'upright-portrait',
    final.uprightPortrait,
    'All of it',
    'The whole finished instrument from above',
  ),
  entry(
    'final-check',
    'headstock-done',
    final.headstockDone,
    'Headstock',
    'A finished headstock with tuners, the shop soft behind it',
  ),
  entry(
    'final-check',
    'final-look',
    final.finalLook,
    'Under the bench lamp',
    'Low view along the finished instrument under a green lamp',
  ),
  entry(
    'final-check',
    'in-the-case',
    final.inTheCase,
    'In its case',
    'The finished instrument in an open case lined in red',
  ),
];
