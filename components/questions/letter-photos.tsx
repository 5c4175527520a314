import { useId } from 'react';
import { PhotoTiles } from '@/components/bench/photo-tiles';
import { FieldError } from '@/components/ui/field';
import { ProgressBar } from '@/components/ui/progress-bar';
import { controlClass, controlSizes } from '@/components/ui/field';
import { MAX_PHOTOS_PER_ENTRY } from '@/lib/photos/limits';
import { isGoingUp, shareDone, uploadWords } from '@/lib/photos/upload-state';
import type { LetterPhoto, LetterPhotos as Photos } from './use-letter-photos';

type LetterPhotosProps = { photos: Photos; error?: string; isLocked: boolean };

/** The photos that go with a letter: how far each has come, what each shows, and the way to add one. */
export function LetterPhotos({ photos, error, isLocked }: LetterPhotosProps) {
  const id = useId();
  const hasRoom = photos.list.length < MAX_PHOTOS_PER_ENTRY && !isLocked;
  return (
    <div role="group" aria-label="Photos" className="grid gap-2.5">
      {photos.list.length > 0 && (
        <ol role="list" className="grid gap-2.5">
          {photos.list.map((photo, index) => (
            <PhotoLine key={photo.uploadKey} photo={photo} number={index + 1} photos={photos} isLocked={isLocked} />
          ))}
        </ol>
      )}
      <div role="alert" className="grid gap-1 empty:hidden">
        {photos.refusals.map((sentence) => (
          <p key={sentence} className="text-sm font-semibold wrap-anywhere text-late">
            {sentence}
          </p>
        ))}
        <FieldError id={id} error={error} />
      </div>
      {hasRoom && (
        <div className="flex flex-wrap gap-2.5 [&>label]:aspect-auto [&>label]:min-h-11 [&>label]:px-4 [&>label]:py-1.5 [&>label]:text-base">
          <PhotoTiles hasPhotos={photos.list.length > 0} isReading={photos.isReading} onChoose={photos.choose} />
        </div>
      )}
    </div>
  );
}

type PhotoLineProps = { photo: LetterPhoto; number: number; photos: Photos; isLocked: boolean };

function PhotoLine({ photo: { uploadKey, alt, upload }, number, photos, isLocked }: PhotoLineProps) {
  const id = useId();
  return (
    <li className="grid grid-cols-[4rem_minmax(0,1fr)_auto] items-center gap-x-3 gap-y-1">
      {upload.step === 'ready' ? (
        <img src={`/api/photos/${upload.photoId}/320`} alt="" className="size-16 rounded-[5px] object-cover" />
      ) : (
        <span className="grid size-16 content-end overflow-hidden rounded-[5px] bg-line">
          {isGoingUp(upload) && <ProgressBar share={shareDone(upload)} label={`Photo ${number} on its way`} />}
        </span>
      )}
      <input
        aria-label={`Photo ${number}: what does it show?`}
        aria-describedby={id}
        placeholder="What does it show?"
        maxLength={300}
        autoComplete="off"
        value={alt}
        disabled={isLocked}
        onChange={({ target }) => photos.describe(uploadKey, target.value)}
        className={`${controlClass} ${controlSizes.normal}`}
      />
      <button
        type="button"
        disabled={isLocked}
        onClick={() => photos.remove(uploadKey)}
        className="min-h-11 px-2 font-semibold text-finish-deep disabled:opacity-55"
      >
        Remove<span className="sr-only"> photo {number}</span>
      </button>
      <p
        id={id}
        className={
          upload.step === 'ready' || isGoingUp(upload) ? 'sr-only' : 'col-span-2 col-start-2 text-sm text-late'
        }
      >
        {uploadWords(upload)}
      </p>
      {(upload.step === 'waiting' || upload.step === 'failed') && (
        <button
          type="button"
          onClick={() => photos.tryNow(uploadKey)}
          className="col-start-2 min-h-11 justify-self-start font-semibold text-finish-deep"
        >
          Try now<span className="sr-only">: photo {number}</span>
        </button>
      )}
    </li>
  );
}
