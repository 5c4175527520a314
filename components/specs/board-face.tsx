import type { Fingerboard, StringLine } from '@/lib/craft/fingerboard';
import type { InlayMark } from '@/lib/craft/inlays';
import { between, type Point } from '@/lib/craft/plane';

type FaceProps = { board: Fingerboard; gaugesThou?: readonly number[] };

const NUT_MM = 3.5;
const FRET_MM = 1.1;
const MM_PER_THOU = 0.0254;
const THINNEST_MM = 0.35;
/** How far the strings are drawn on behind the board. */
const STRING_END_MM = 12;
const GRAIN = [0.11, 0.27, 0.38, 0.56, 0.69, 0.88];

/** Wood, nut, frets, inlays and strings in the board's own mm; goes into an svg whose viewBox is in mm too. */
export function BoardFace({ board, gaugesThou }: FaceProps) {
  const { outline, frets, inlays, strings } = board;
  const [nut] = frets;
  return (
    <>
      <polygon
        points={pointsOf(outline)}
        strokeWidth="0.5"
        className="fill-wood stroke-black/30 dark:stroke-white/25"
      />
      <Grain outline={outline} />
      {nut && <polygon points={pointsOf(nutCorners(nut.treble, nut.bass))} className="fill-nut" />}
      {frets.slice(1).map(({ fret, treble, bass }) => (
        <line key={fret} {...ends(treble, bass)} strokeWidth={FRET_MM} className="stroke-fret" />
      ))}
      {inlays.map((mark, i) => (
        <Mark key={i} mark={mark} />
      ))}
      {strings.map((string) => (
        <StringOver
          key={string.number}
          string={string}
          widthMm={widthOf(string, strings.length, gaugesThou)}
          board={board}
        />
      ))}
    </>
  );
}

function Grain({ outline }: { outline: Point[] }) {
  const [nutTreble, nutBass, endBass, endTreble] = outline;
  if (!nutTreble || !nutBass || !endBass || !endTreble) return null;
  return GRAIN.map((share) => (
    <line
      key={share}
      {...ends(between(nutTreble, nutBass, share), between(endTreble, endBass, share))}
      strokeWidth="0.6"
      strokeOpacity="0.07"
      className="stroke-nut"
    />
  ));
}

function Mark({ mark }: { mark: InlayMark }) {
  if (mark.kind === 'block') return <polygon points={pointsOf(mark.corners)} className="fill-nut" />;
  return <circle cx={tidy(mark.centre.x)} cy={tidy(mark.centre.y)} r={tidy(mark.radiusMm)} className="fill-nut" />;
}

function StringOver({ string, widthMm, board }: { string: StringLine; widthMm: number; board: Fingerboard }) {
  const { nut, bridge } = string;
  const share = (board.bounds.right + STRING_END_MM - nut.x) / (bridge.x - nut.x);
  return <line {...ends(nut, between(nut, bridge, share))} strokeWidth={tidy(widthMm)} className="stroke-fret" />;
}

/** True to scale down to what a screen can show; a usual set when the gauges are not known. */
function widthOf({ number }: StringLine, count: number, gaugesThou: readonly number[] | undefined): number {
  const usual = 10 + (36 * (number - 1)) / Math.max(1, count - 1);
  return Math.max(THINNEST_MM, (gaugesThou?.[number - 1] ?? usual) * MM_PER_THOU);
}

function nutCorners(treble: Point, bass: Point): Point[] {
  const behind = (point: Point) => ({ x: point.x - NUT_MM, y: point.y });
  return [behind(treble), treble, bass, behind(bass)];
}

function ends(from: Point, to: Point) {
  return { x1: tidy(from.x), y1: tidy(from.y), x2: tidy(to.x), y2: tidy(to.y) };
}

function pointsOf(points: Point[]): string {
  return points.map(({ x, y }) => `${tidy(x)},${tidy(y)}`).join(' ');
}

function tidy(mm: number): number {
  return Number(mm.toFixed(3));
}
