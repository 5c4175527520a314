'use client';

import { clsx } from 'clsx';
import { useEffect, useRef } from 'react';
import type { BenchPhoto } from './draft-state';
import { ProgressBar } from '@/components/ui/progress-bar';
import { isGoingUp, shareDone, type UploadState } from '@/lib/photos/upload-state';

const marks: Partial<Record<UploadState['step'], string>> = {
  waiting: 'Waits',
  refused: 'Not taken',
  failed: 'Stopped',
};

/** One chosen photo, square, with its number and how far it has come. */
export function PhotoThumb({ photo: { blob, upload }, number }: { photo: BenchPhoto; number: number }) {
  const mark = marks[upload.step];
  return (
    <div className="relative aspect-square overflow-hidden rounded-[5px] bg-line">
      <BlobImage blob={blob} />
      <NumberBadge number={number} className="absolute top-1.5 left-1.5" />
      {isGoingUp(upload) && (
        <ProgressBar
          share={shareDone(upload)}
          label={`Photo ${number} on its way`}
          className="absolute inset-x-0 bottom-0 h-3 rounded-none"
        />
      )}
      {mark && (
        <p
          className={clsx(
            'absolute inset-x-0 bottom-0 px-1 py-1 text-center text-sm font-semibold',
            upload.step === 'waiting' ? 'bg-brass-wash text-ink' : 'bg-late text-on-late',
          )}
        >
          {mark}
        </p>
      )}
    </div>
  );
}

export function NumberBadge({ number, className }: { number: number; className?: string }) {
  return (
    <span
      aria-hidden="true"
      className={clsx(
        'narrow grid size-6 place-items-center rounded-full bg-night text-sm font-semibold text-on-night',
        className,
      )}
    >
      {number}
    </span>
  );
}

/** The photo as it lies on this phone; its row says what it shows. */
function BlobImage({ blob }: { blob: Blob }) {
  const image = useRef<HTMLImageElement>(null);
  useEffect(() => {
    if (!image.current) return;
    const url = URL.createObjectURL(blob);
    image.current.src = url;
    return () => URL.revokeObjectURL(url);
  }, [blob]);
  return <img ref={image} alt="" decoding="async" className="size-full object-cover" />;
}
