'use client';

import { useId } from 'react';
import { LinePhoto } from './line-photo';
import type { Saving } from './line-saver';
import { useRunLine, type LineMark } from './use-run-line';
import { Segmented } from '@/components/ui/segmented';
import { TextInput } from '@/components/ui/text-input';
import type { CheckRunLine } from '@/db/queries/checks';
import { checkMarks, type CheckMark } from '@/lib/validation/checks';

const options = [
  { value: 'pass', label: 'Pass' },
  { value: 'fail', label: 'Fail' },
  { value: 'not_applicable', label: 'Not here' },
];

const isMark = (value: string): value is CheckMark => checkMarks.some((mark) => mark === value);

type RunLineProps = {
  line: CheckRunLine;
  number: number;
  orderNumber: string;
  url: string;
  onMark: (lineId: string, mark: LineMark, saving: Saving) => void;
};

/** One line to look at, for one thumb: pass, fail or not here, words and a photo where they are asked for. */
export function RunLine({ line, number, orderNumber, url, onMark }: RunLineProps) {
  const id = useId();
  const { mark, saving, change } = useRunLine(line, url, onMark);
  return (
    <li id={`line-${line.id}`} className="grid gap-3 border-b border-line py-5">
      <p id={id} className="text-lg">
        <span className="narrow mr-2 text-soft">{number}</span>
        {line.text}
      </p>
      <Segmented
        legend={line.text}
        isLegendHidden
        name={`mark-${line.id}`}
        size="bench"
        options={options}
        value={mark.mark ?? ''}
        onChange={({ target }) => isMark(target.value) && change({ mark: target.value })}
      />
      {mark.mark === 'fail' && (
        <TextInput
          label="What is wrong"
          isOptional
          controlSize="bench"
          maxLength={300}
          defaultValue={mark.note}
          onBlur={({ target }) => target.value !== mark.note && change({ note: target.value })}
        />
      )}
      {(line.photoNeeded || mark.mark === 'fail') && mark.mark !== 'not_applicable' && (
        <LinePhoto
          orderNumber={orderNumber}
          lineText={line.text}
          photoId={mark.photoId}
          isNeeded={line.photoNeeded}
          onReady={(photoId) => change({ photoId })}
        />
      )}
      <SavedWords saving={saving} isMarked={mark.mark !== null} hasPhoto={mark.photoId !== null} />
    </li>
  );
}

function SavedWords({ saving, isMarked, hasPhoto }: { saving: Saving; isMarked: boolean; hasPhoto: boolean }) {
  if (saving.step === 'refused')
    return (
      <p role="alert" className="font-semibold text-late">
        {saving.message}
      </p>
    );
  return (
    <p role="status" className="text-sm text-soft empty:hidden">
      {!isMarked && hasPhoto && 'Choose pass or fail, and the photo is kept with it.'}
      {saving.step === 'saving' && 'Saving'}
      {saving.step === 'saved' && 'Saved'}
      {saving.step === 'waiting' && 'No signal. It saves itself when you are back in range; keep this page open.'}
    </p>
  );
}
