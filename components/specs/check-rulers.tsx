import type { FretSheet } from '@/lib/craft/fret-sheet';

const MM_PER_INCH = 25.4;
const BETWEEN_RULERS_MM = 14;

/** Two upright rulers, 100 mm and 4 in, to lay a real one against. */
export function CheckRulers({ sheet }: { sheet: FretSheet }) {
  const { rulerLeftMm, boardTopMm, rulerMm, rulerIn } = sheet;
  return (
    <>
      <Ruler left={rulerLeftMm} top={boardTopMm} unitMm={1} count={rulerMm} every={10} half={5} name="mm" />
      <Ruler
        left={rulerLeftMm + BETWEEN_RULERS_MM}
        top={boardTopMm}
        unitMm={MM_PER_INCH / 16}
        count={rulerIn * 16}
        every={16}
        half={8}
        name="in"
      />
    </>
  );
}

type RulerProps = {
  left: number;
  top: number;
  /** Distance of two strokes, and after how many of them comes a figure and a half-length stroke. */
  unitMm: number;
  count: number;
  every: number;
  half: number;
  name: 'mm' | 'in';
};

function Ruler({ left, top, unitMm, count, every, half, name }: RulerProps) {
  const strokes = Array.from({ length: count + 1 }, (_, i) => i);
  const lengthOf = (i: number) => (i % every === 0 ? 5 : i % half === 0 ? 3.5 : 2);
  const yOf = (i: number) => Number((top + i * unitMm).toFixed(4));
  return (
    <g stroke="black" strokeWidth="0.15">
      <line x1={left} y1={yOf(0)} x2={left} y2={yOf(count)} />
      {strokes.map((i) => (
        <line key={i} x1={left} y1={yOf(i)} x2={left + lengthOf(i)} y2={yOf(i)} />
      ))}
      <g stroke="none" fill="black" fontSize="2.6">
        {strokes
          .filter((i) => i % every === 0)
          .map((i) => (
            <text key={i} x={left + 5.6} y={yOf(i) + 0.9}>
              {name === 'mm' ? i : i / every}
            </text>
          ))}
        <text x={left} y={yOf(count) + 4.5}>
          {name}
        </text>
      </g>
    </g>
  );
}
