'use client';

import { useEffect, useRef, useState, type KeyboardEvent } from 'react';
import { photoHref } from './photo-image';
import type { DiaryPhoto } from '@/db/queries/diary';

type LargeViewProps = { photos: DiaryPhoto[]; startAt: number; onClose: () => void };

/** Photos one at a time, as large as the screen: arrow keys turn the page, Escape closes and gives focus back. */
export function LargeView({ photos, startAt, onClose }: LargeViewProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const [index, setIndex] = useState(startAt);
  const photo = photos[index];

  useEffect(() => {
    if (ref.current && !ref.current.open) ref.current.showModal();
  }, []);

  const turn = (step: number) => setIndex((now) => Math.min(photos.length - 1, Math.max(0, now + step)));

  function onKeyDown(event: KeyboardEvent) {
    if (event.key === 'ArrowRight') turn(1);
    if (event.key === 'ArrowLeft') turn(-1);
  }

  if (!photo) return null;
  return (
    <dialog
      ref={ref}
      onClose={onClose}
      onKeyDown={onKeyDown}
      aria-label="Photo, large"
      className="m-0 h-dvh max-h-none w-screen max-w-none bg-night text-on-night backdrop:bg-night"
    >
      <div className="flex h-full flex-col [--finish-deep:var(--night-accent)]">
        <div className="flex min-h-14 items-center justify-between gap-4 px-4">
          <p role="status" className="text-on-night-soft tabular-nums">
            {index + 1} of {photos.length}
          </p>
          <button type="button" autoFocus onClick={() => ref.current?.close()} className="min-h-12 px-3 font-semibold">
            Close
          </button>
        </div>
        <div className="relative min-h-0 flex-1">
          <img
            key={photo.id}
            src={photoHref(photo.id, 2048)}
            srcSet={`${photoHref(photo.id, 1280)} 1280w, ${photoHref(photo.id, 2048)} 2048w`}
            sizes="100vw"
            width={photo.widthPx}
            height={photo.heightPx}
            alt={photo.alt || 'Photo from the bench'}
            className="absolute inset-0 h-full w-full object-contain"
          />
        </div>
        <div className="flex min-h-16 items-center justify-between gap-4 px-4">
          <TurnButton label="Back" isDisabled={index === 0} onClick={() => turn(-1)} />
          <p className="max-w-2xl py-3 text-center text-on-night-soft">{photo.alt}</p>
          <TurnButton label="Next" isDisabled={index === photos.length - 1} onClick={() => turn(1)} />
        </div>
      </div>
    </dialog>
  );
}

function TurnButton({ label, isDisabled, onClick }: { label: string; isDisabled: boolean; onClick: () => void }) {
  return (
    <button
      type="button"
      aria-disabled={isDisabled}
      onClick={onClick}
      className="min-h-12 min-w-16 px-3 font-semibold aria-disabled:opacity-40"
    >
      {label}
    </button>
  );
}
