import { PageSection } from '@/components/people/page-frame';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { MovingBoard } from '@/db/queries/readings';
import { figure } from '@/lib/craft/figure';
import { moistureWords } from '@/lib/craft/moisture';
import type { ExpectedMovement } from '@/lib/craft/movement';
import { movementBetween } from '@/lib/readings/board-movement';
import type { Point } from '@/lib/readings/series';
import { dayWords } from '@/lib/date-words';

type BoardMovementsProps = {
  boards: MovingBoard[];
  moisture: Point[];
  zone: string;
  nowMs: number;
};

const columns = [
  { key: 'board', label: 'Board' },
  { key: 'width', label: 'Width it is reckoned on', isNumeric: true },
  { key: 'quarter', label: 'Sawn on the quarter', isNumeric: true },
  { key: 'flat', label: 'Sawn flat', isNumeric: true },
];

const MM_PER_IN = 25.4;

/** How far the boards of the spec have moved between their first moisture and their last. */
export function BoardMovements({ boards, moisture, zone, nowMs }: BoardMovementsProps) {
  const [first] = moisture;
  const last = moisture.at(-1);
  const moved = boards.flatMap((board) => {
    const movement = movementBetween(board, board.movement, moisture);
    return movement ? [{ board, movement }] : [];
  });
  if (moved.length === 0 || !first || !last) return null;
  const isApproximate = moved.some(({ movement }) =>
    [movement.radial, movement.tangential].some((one) => one?.isApproximate),
  );
  return (
    <PageSection title="How far the wood has moved">
      <p className="max-w-[62ch]">
        From {moistureWords(first.value)} on {dayWords(first.atMs, zone, nowMs)} to {moistureWords(last.value)} on{' '}
        {dayWords(last.atMs, zone, nowMs)}, across the width. A real board lies between the two columns.
      </p>
      <Table caption="Expected movement of the boards" columns={columns}>
        {moved.map(({ board, movement }) => (
          <Row key={board.label}>
            <RowHead>{board.label}</RowHead>
            <Cell isNumeric note={board.widthLabel}>
              {lengthWords(board.widthMm)}
            </Cell>
            <Cell isNumeric>{changeWords(movement.radial)}</Cell>
            <Cell isNumeric>{changeWords(movement.tangential)}</Cell>
          </Row>
        ))}
      </Table>
      {isApproximate && (
        <p className="text-soft">
          &ldquo;About&rdquo; marks figures that rest on values we could not read at their source.
        </p>
      )}
    </PageSection>
  );
}

const lengthWords = (mm: number) => `${figure(mm, 1)} mm (${figure(mm / MM_PER_IN, 2)} in)`;

function changeWords(expected: ExpectedMovement | null): string {
  if (!expected) return 'not known';
  const size = Math.abs(expected.change);
  if (size < 0.005) return 'none';
  const about = expected.isApproximate ? 'about ' : '';
  const amount = `${figure(size, 2)} mm (${figure(size / MM_PER_IN, 3)} in)`;
  return `${about}${amount} ${expected.change < 0 ? 'narrower' : 'wider'}`;
}
