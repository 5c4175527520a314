import { useState } from 'react';
import type { FieldsProps } from './fields';
import { ReadingInput } from './reading-input';
import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { figure } from '@/lib/craft/figure';
import { TRUSS_ROD_SENTENCE } from '@/lib/craft/set-up';
import { isIntonation, type MeasureLine } from '@/lib/readings/measure-line';
import { readTwoNotes, turnDoubt } from '@/lib/readings/set-up-aids';

const USUAL_LIMIT_CENTS = 3;

/** What a set-up is asked before it is measured: how far the rod is turned, and how far two notes lie apart. */
export function SetUpAids({ typed, plan, onType }: Pick<FieldsProps, 'typed' | 'plan' | 'onType'>) {
  const lines = plan.lines.filter(isIntonation);
  return (
    <div className="grid gap-5">
      <TurnOfTheRod />
      {lines.length > 0 && (
        <TwoNotes lines={lines} take={(key, cents) => onType({ measures: { ...typed.measures, [key]: cents } })} />
      )}
    </div>
  );
}

function TurnOfTheRod() {
  const [turn, setTurn] = useState('');
  const doubt = turnDoubt(turn);
  return (
    <div className="grid gap-2">
      <p className="text-sm text-soft">{TRUSS_ROD_SENTENCE}</p>
      <ReadingInput
        label="The turn you are about to make"
        hint="In parts of a whole turn, such as 1/8. It is only looked at, not kept."
        inputMode="text"
        unit="turn"
        value={turn}
        onType={setTurn}
        doubt={doubt ?? undefined}
      />
    </div>
  );
}

type TwoNotesProps = { lines: MeasureLine[]; take: (key: string, cents: string) => void };

/** Cents from two frequencies, for a tuner that shows Hz. */
function TwoNotes({ lines, take }: TwoNotesProps) {
  const [notes, setNotes] = useState({ fretted: '', harmonic: '' });
  const [chosen, setChosen] = useState('');
  const line = lines.find(({ key }) => key === chosen) ?? lines[0];
  const limit = Number(line?.tolerance);
  const { doubts, found } = readTwoNotes(notes, limit >= 0 ? limit : USUAL_LIMIT_CENTS);
  return (
    <details>
      <summary className="flex min-h-11 cursor-pointer items-center font-semibold text-finish-deep">
        Cents from two frequencies
      </summary>
      <div className="grid gap-4 pt-2">
        <div className="grid grid-cols-2 items-start gap-3">
          <ReadingInput
            label="Fretted at the 12th"
            unit="Hz"
            value={notes.fretted}
            onType={(fretted) => setNotes({ ...notes, fretted })}
            doubt={doubts.fretted}
          />
          <ReadingInput
            label="Harmonic there"
            unit="Hz"
            value={notes.harmonic}
            onType={(harmonic) => setNotes({ ...notes, harmonic })}
            doubt={doubts.harmonic}
          />
        </div>
        <p aria-live="polite" className="empty:hidden">
          {found?.words}
        </p>
        {found && line && (
          <div className="grid gap-3">
            <Select
              label="For"
              controlSize="bench"
              options={lines.map(({ key, label }) => ({ value: key, label }))}
              value={line.key}
              onChange={({ target }) => setChosen(target.value)}
            />
            <Button variant="quiet" onClick={() => take(line.key, figure(found.cents, 1))}>
              Write it on that line
            </Button>
          </div>
        )}
      </div>
    </details>
  );
}
