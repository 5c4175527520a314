'use client';

import { useId, type ReactNode } from 'react';
import type { SignedFile } from './use-signed-file';
import { Button } from '@/components/ui/button';
import { FieldError } from '@/components/ui/field';
import { ProgressBar } from '@/components/ui/progress-bar';

type FileFieldProps = {
  file: SignedFile | null;
  error?: string;
  onChoose: (file: File) => void;
  onTryAgain: () => void;
};

const accepted = 'application/pdf,image/jpeg,image/png,image/webp';

/** The PDF or photo that is signed, and its way to the shop. */
export function FileField({ file, error, onChoose, onTryAgain }: FileFieldProps) {
  const id = useId();
  return (
    <div className="grid gap-2">
      <label htmlFor={id} className="font-semibold">
        What is signed
      </label>
      <p id={`${id}-hint`} className="text-sm text-soft">
        A PDF up to 50 MB, or a photo. It goes up while you fill in the rest.
      </p>
      <input
        id={id}
        type="file"
        accept={accepted}
        aria-describedby={error ? `${id}-hint ${id}-error` : `${id}-hint`}
        aria-invalid={error ? true : undefined}
        onChange={({ target }) => {
          const [chosen] = target.files ?? [];
          if (chosen) onChoose(chosen);
        }}
        className="min-h-11 w-full rounded-[5px] border-[1.5px] border-edge bg-sheet p-2 file:mr-3 file:min-h-8 file:rounded file:border-0 file:bg-tint file:px-3 file:font-semibold file:text-finish-deep aria-invalid:border-late"
      />
      <div role="status">{file && <Progress file={file} onTryAgain={onTryAgain} />}</div>
      <FieldError id={id} error={error} />
    </div>
  );
}

function Progress({ file: { name, upload }, onTryAgain }: { file: SignedFile; onTryAgain: () => void }) {
  switch (upload.step) {
    case 'measuring':
      return <Line name={name}>is being got ready</Line>;
    case 'sending':
      return (
        <Line name={name} share={0.05 + upload.share * 0.85}>
          goes up, {Math.round(upload.share * 100)} %
        </Line>
      );
    case 'checking':
      return (
        <Line name={name} share={0.95}>
          has arrived; the shop looks at it
        </Line>
      );
    case 'waiting':
      return <Line name={name}>waits. {upload.message}</Line>;
    case 'ready':
      return (
        <Line name={name} share={1}>
          is ready to be sent
        </Line>
      );
    case 'refused':
      return <p className="font-semibold text-late">{upload.message}</p>;
    case 'failed':
      return (
        <div className="flex flex-wrap items-center gap-3">
          <p className="font-semibold text-late">{upload.message}</p>
          <Button variant="quiet" onClick={onTryAgain}>
            Try again
          </Button>
        </div>
      );
  }
}

function Line({ name, share, children }: { name: string; share?: number; children: ReactNode }) {
  return (
    <div className="grid gap-1.5">
      <p className="break-words">
        <bdi className="font-semibold">{name}</bdi> {children}
      </p>
      {share !== undefined && <ProgressBar share={share} label={`Sending ${name}`} />}
    </div>
  );
}
