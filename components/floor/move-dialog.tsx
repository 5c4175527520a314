'use client';

import { useState } from 'react';
import { TakeBackForm } from './take-back-form';
import { sendMoves, type MoveAnswer, type MoveWish } from './send-moves';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import { placeWords, stagesOfRow, type FloorRoute, type FloorRow } from '@/lib/floor/row';

type MoveDialogProps = {
  row: FloorRow;
  /** The builds on its rack, itself among them. */
  onRack: readonly FloorRow[];
  routes: readonly FloorRoute[];
  onClose: () => void;
  onMoved: (answer: Extract<MoveAnswer, { ok: true }>) => void;
};

/** The stage a build would start next; null at the last. */
function nextStage(row: FloorRow, routes: readonly FloorRoute[]) {
  return stagesOfRow(row, routes)[row.days === null ? row.at : row.at + 1] ?? null;
}

/** Everything that can be done with one build's place: on, with its rack, or back. */
export function MoveDialog({ row, onRack, routes, onClose, onMoved }: MoveDialogProps) {
  const [refusal, setRefusal] = useState('');
  const [isSending, setSending] = useState(false);
  const next = nextStage(row, routes);
  const send = async (wish: MoveWish) => {
    setSending(true);
    const answer = await sendMoves(wish);
    setSending(false);
    if (answer.ok) onMoved(answer);
    else setRefusal(Object.values(answer.refused.fields)[0] ?? answer.refused.message);
  };
  const movesOf = (rows: readonly FloorRow[]) =>
    rows.flatMap((each) => {
      const stage = nextStage(each, routes);
      return stage ? [{ orderNumber: each.orderNumber, toStageKey: stage.key }] : [];
    });
  const place = placeWords(row, routes);
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={`Move ${row.orderNumber}`}
      description={[`Now: ${place}`, row.rack && `on ${row.rack}`].filter(Boolean).join(', ')}
    >
      <div className="grid gap-3">
        {row.waits.map(({ words }, index) => (
          <p key={index} className="border-l-4 border-brass pl-3">
            {words}
          </p>
        ))}
        {next ? (
          <Button disabled={isSending} onClick={() => send({ moves: movesOf([row]) })}>
            Start {next.name}
          </Button>
        ) : (
          <p className="text-soft">It is in its last stage. The final check says when it is ready.</p>
        )}
        {row.rack && onRack.length > 1 && (
          <Button variant="quiet" disabled={isSending} onClick={() => send({ moves: movesOf(onRack), rack: row.rack })}>
            Move all of {row.rack} on: {onRack.length} builds
          </Button>
        )}
        <TakeBackForm
          stages={stagesOfRow(row, routes).slice(0, row.at)}
          isSending={isSending}
          onSend={(toStageKey, reason) => send({ moves: [{ orderNumber: row.orderNumber, toStageKey }], reason })}
        />
        {refusal && (
          <Notice tone="late" role="alert">
            {refusal}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}
