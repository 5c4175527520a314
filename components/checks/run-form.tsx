'use client';

import { useCallback, useState } from 'react';
import { FinishForm } from './finish-form';
import type { Saving } from './line-saver';
import { RunLine } from './run-line';
import type { LineMark } from './use-run-line';
import type { Option } from '@/components/ui/select';
import type { CheckRun } from '@/db/queries/checks';
import type { FormAction } from '@/lib/action';
import { lacksPhoto } from '@/lib/checks/outcome';

type Known = LineMark & { isSaved: boolean };

type RunFormProps = {
  run: CheckRun;
  orderNumber: string;
  /** Earlier stages it can go back to, the nearest first. */
  stages: Option[];
  finish: FormAction;
};

/** A walk through an inspection list: the lines, how many are left, and the end of it. */
export function RunForm({ run, orderNumber, stages, finish }: RunFormProps) {
  const [known, setKnown] = useState<Record<string, Known>>({});
  const onMark = useCallback((lineId: string, mark: LineMark, saving: Saving) => {
    setKnown((before) => ({ ...before, [lineId]: { ...mark, isSaved: saving.step === 'saved' } }));
  }, []);
  const url = `/api/builds/${encodeURIComponent(orderNumber)}/checks/${encodeURIComponent(run.id)}`;
  const left = run.lines.filter((line) => {
    const mark = known[line.id];
    return !mark?.isSaved || lacksPhoto({ ...line, ...mark });
  });
  const hasFailed = Object.values(known).some(({ mark }) => mark === 'fail');
  return (
    <>
      <ol role="list" className="border-t-2 border-ink">
        {run.lines.map((line, index) => (
          <RunLine key={line.id} line={line} number={index + 1} orderNumber={orderNumber} url={url} onMark={onMark} />
        ))}
      </ol>
      <FinishForm
        finish={finish}
        values={{ orderNumber, runId: run.id }}
        stages={stages}
        hasFailed={hasFailed}
        leftCount={left.length}
        lineCount={run.lines.length}
      />
    </>
  );
}
