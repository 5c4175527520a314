'use client';

import { useId, useState } from 'react';
import { ReadingInput } from './reading-input';
import { PageSection } from '@/components/people/page-frame';
import { Button } from '@/components/ui/button';
import { figure } from '@/lib/craft/figure';
import { noBoard, readLot, type BoardDoubts, type TypedBoard } from '@/lib/readings/lumber-lot';

const MOST_BOARDS = 60;

/** Board feet of the boards in hand, computed as they are typed. Nothing of it is kept. */
export function LumberLot() {
  const [boards, setBoards] = useState<TypedBoard[]>([noBoard]);
  const lot = readLot(boards);
  const say = (at: number, change: Partial<TypedBoard>) =>
    setBoards(boards.map((board, index) => (index === at ? { ...board, ...change } : board)));
  const last = boards.at(-1);
  return (
    <PageSection title="Board feet of a lot">
      <p className="max-w-[62ch] text-soft">
        For counting what came in. It is computed here and kept nowhere; write the sum into the entry.
      </p>
      <ol role="list" className="grid gap-5">
        {boards.map((board, index) => (
          <BoardRow
            key={index}
            number={index + 1}
            board={board}
            doubts={lot.doubts[index] ?? {}}
            say={(change) => say(index, change)}
          />
        ))}
      </ol>
      <div className="flex flex-wrap gap-3">
        <Button
          variant="quiet"
          disabled={boards.length >= MOST_BOARDS}
          onClick={() => setBoards([...boards, { ...noBoard, thickness: last?.thickness ?? noBoard.thickness }])}
        >
          Add a board
        </Button>
        {boards.length > 1 && (
          <Button variant="quiet" onClick={() => setBoards(boards.slice(0, -1))}>
            Take the last one out
          </Button>
        )}
      </div>
      <LotWords lot={lot} />
    </PageSection>
  );
}

const boardFields = [
  { name: 'thickness', label: 'Thickness', unit: undefined },
  { name: 'width', label: 'Width', unit: 'in' },
  { name: 'length', label: 'Length', unit: 'ft' },
] as const;

type BoardRowProps = {
  number: number;
  board: TypedBoard;
  doubts: BoardDoubts;
  say: (change: Partial<TypedBoard>) => void;
};

function BoardRow({ number, board, doubts, say }: BoardRowProps) {
  const id = useId();
  return (
    <li>
      <fieldset aria-labelledby={id} className="grid max-w-2xl gap-2">
        <p id={id} className="text-sm text-soft">
          Board {number}
        </p>
        <div className="grid grid-cols-3 items-start gap-3">
          {boardFields.map(({ name, label, unit }) => (
            <ReadingInput
              key={name}
              label={label}
              unit={unit}
              inputMode="text"
              value={board[name]}
              onType={(text) => say({ [name]: text })}
              doubt={doubts[name]}
            />
          ))}
        </div>
      </fieldset>
    </li>
  );
}

function LotWords({
  lot: { boardCount, exactBoardFeet, talliedBoardFeet, bundledBoardFeet },
}: {
  lot: ReturnType<typeof readLot>;
}) {
  if (boardCount === 0)
    return <p className="text-soft">Write width and length of a board, and its board feet stand here.</p>;
  return (
    <p aria-live="polite" className="max-w-[62ch]">
      <strong className="font-semibold">{figure(exactBoardFeet, 2)} board feet</strong> by exact volume,{' '}
      {boardCount === 1 ? 'one board' : `${boardCount} boards`}. A yard that measures board by board, lengths to the
      whole foot, counts {figure(talliedBoardFeet, 2)}; one that tallies the bundle, widths to the inch too,{' '}
      {figure(bundledBoardFeet, 2)}.
    </p>
  );
}
