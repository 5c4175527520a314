import { useId, useRef, type Dispatch } from 'react';
import type { DraftEvent } from './draft-state';
import { PhotoRow } from './photo-row';
import { PhotoThumb } from './photo-thumb';
import { PhotoTiles } from './photo-tiles';
import type { BenchPhotos } from './use-photos';
import { FieldError } from '@/components/ui/field';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';

type PhotoFieldProps = { photos: BenchPhotos; error?: string; isLocked: boolean; dispatch: Dispatch<DraftEvent> };

/** The photos of an entry: how far each has come, what each shows, and the two ways to add one. */
export function PhotoField({ photos, error, isLocked, dispatch }: PhotoFieldProps) {
  const id = useId();
  const heading = useRef<HTMLHeadingElement>(null);
  const { list, refusals } = photos;
  const readyCount = list.filter(({ upload }) => upload.step === 'ready').length;
  const hasRoom = list.length < MAX_PHOTOS_PER_ENTRY && !isLocked;
  return (
    <section aria-labelledby={id} className="grid gap-3">
      <div className="flex items-baseline justify-between gap-4">
        <h2 ref={heading} id={id} tabIndex={-1} className="text-xl outline-none">
          Photos
        </h2>
        <p role="status" className="text-soft">
          {list.length > 0 && `${readyCount} of ${list.length} uploaded`}
        </p>
      </div>
      <div className="grid grid-cols-3 gap-2.5 sm:grid-cols-4">
        {list.map((photo, index) => (
          <PhotoThumb key={photo.uploadKey} photo={photo} number={index + 1} />
        ))}
        {hasRoom && <PhotoTiles hasPhotos={list.length > 0} isReading={photos.isReading} onChoose={photos.choose} />}
      </div>
      <div role="alert" className="grid gap-2 empty:hidden">
        {refusals.map((sentence) => (
          <p key={sentence} className="font-semibold break-words text-late">
            {sentence}
          </p>
        ))}
        <FieldError id={id} error={error} />
      </div>
      {list.length > 0 && (
        <ol role="list" aria-label="What each photo shows" className="grid gap-2.5">
          {list.map((photo, index) => (
            <PhotoRow
              key={photo.uploadKey}
              photo={photo}
              number={index + 1}
              isLocked={isLocked}
              onDescribe={(alt) => dispatch({ type: 'photo-described', uploadKey: photo.uploadKey, alt })}
              onRemove={() => {
                photos.remove(photo.uploadKey);
                heading.current?.focus();
              }}
              onTryNow={() => photos.tryNow(photo.uploadKey)}
            />
          ))}
        </ol>
      )}
    </section>
  );
}
