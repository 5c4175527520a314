import { neckSpacing } from '@/lib/craft/frets';
import { placeWords, stagesOfRow, type FloorRoute, type FloorRow } from '@/lib/floor/row';

const WIDTH = 1000;
const paths = new Map<number, { at: number[]; frets: string }>();

/** Where the frets of a neck with so many stages lie; the same for all builds of a route. */
function spacingOf(count: number) {
  const known = paths.get(count);
  if (known) return known;
  const at = neckSpacing(count).map((share) => Math.round(share * WIDTH));
  const made = {
    at,
    frets: at
      .slice(1, -1)
      .map((x) => `M${x} 0V24`)
      .join(''),
  };
  paths.set(count, made);
  return made;
}

/** One build's neck in as few shapes as it takes: five hundred are drawn. */
export function FloorNeck({ row, routes }: { row: FloorRow; routes: readonly FloorRoute[] }) {
  const count = stagesOfRow(row, routes).length;
  if (count === 0) return null;
  const { at, frets } = spacingOf(count);
  const done = at[row.at] ?? WIDTH;
  const now = (at[row.at + 1] ?? WIDTH) - done;
  const place =
    row.at < count ? `Stage ${row.at + 1} of ${count}, ${placeWords(row, routes)}` : placeWords(row, routes);
  return (
    <svg
      role="img"
      aria-label={place}
      viewBox={`0 0 ${WIDTH} 24`}
      preserveAspectRatio="none"
      className="wood block h-6 w-full rounded-r-[4px] border-l-[5px] border-nut print:border"
    >
      <rect width={done + now * row.share} height="24" fill={row.finishHex} />
      <path d={frets} vectorEffect="non-scaling-stroke" strokeWidth="2" className="stroke-fret" />
    </svg>
  );
}
