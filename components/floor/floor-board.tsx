'use client';

import { useCallback, useMemo, useState } from 'react';
import useSWR from 'swr';
import { fetchFloor } from './fetch-floor';
import { FloorHead } from './floor-figures';
import { FloorFilters } from './floor-filters';
import { FloorTable } from './floor-table';
import { MoveDialog } from './move-dialog';
import { NumbersOnly } from './numbers-only';
import { UndoBar, type LastMove } from './undo-bar';
import { useGrowing } from './use-growing';
import { Notice } from '@/components/ui/notice';
import type { Floor, FloorRow } from '@/lib/floor/row';
import { arrange, choicesOf, wishQuery, type FloorChoices, type FloorWish } from '@/lib/floor/wish';

const LOOK_EVERY_MS = 20_000;

type FloorBoardProps = {
  /** The floor with the rows of the first screen, already as they were wished for. */
  first: Floor;
  total: number;
  choices: FloorChoices;
  wish: FloorWish;
  viewerKey: string;
};

/** The floor as it works in the browser: the rest of its rows, what is chosen of them, and moves. */
export function FloorBoard({ first, total, choices, wish: asked, viewerKey }: FloorBoardProps) {
  const [wish, setWish] = useState(asked);
  const [moving, setMoving] = useState<FloorRow | null>(null);
  const [last, setLast] = useState<LastMove | null>(null);
  const { data, error, mutate } = useSWR<Floor, Error>(
    ['/api/floor', viewerKey],
    ([url]: string[]) => fetchFloor(url ?? ''),
    {
      refreshInterval: LOOK_EVERY_MS,
      revalidateOnFocus: true,
      dedupingInterval: 1000,
    },
  );
  const floor = data ?? first;
  const rows = useMemo(() => arrange(floor.rows, wish), [floor, wish]);
  const all = useMemo(() => (data ? choicesOf(data.rows) : choices), [data, choices]);
  const count = useGrowing(rows.length, wishQuery(wish));
  const shown = useMemo(() => rows.slice(0, count), [rows, count]);
  const change = (next: FloorWish) => {
    setWish(next);
    const query = wishQuery(next);
    window.history.replaceState(null, '', query === '' ? '/floor' : `/floor?${query}`);
  };
  const close = useCallback(() => setLast(null), []);
  return (
    <>
      <FloorHead figures={floor.figures} numbersOnly={floor.numbersOnly.length} />
      {error && (
        <Notice role="status">
          The shop cannot be reached just now. What is shown is from the last time it could; it tries again by itself.
        </Notice>
      )}
      <FloorFilters wish={wish} onWish={change} choices={all} routes={floor.routes} departments={floor.departments} />
      <FloorTable rows={shown} routes={floor.routes} total={data ? rows.length : total} onMove={setMoving} />
      <NumbersOnly numbers={floor.numbersOnly} />
      {moving && (
        <MoveDialog
          row={moving}
          onRack={floor.rows.filter(({ rack }) => rack !== null && rack === moving.rack)}
          routes={floor.routes}
          onClose={() => setMoving(null)}
          onMoved={({ moved, left }) => {
            setMoving(null);
            setLast({ at: (last?.at ?? 0) + 1, moved, left });
            void mutate();
          }}
        />
      )}
      {last && (
        <UndoBar
          key={last.at}
          last={last}
          onClose={close}
          onUndone={(left) => {
            setLast(left.length > 0 ? { at: last.at + 1, moved: [], left } : null);
            void mutate();
          }}
        />
      )}
    </>
  );
}
