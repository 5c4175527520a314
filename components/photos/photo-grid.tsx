import { clsx } from 'clsx';
import { PhotoImage } from './photo-image';
import type { DiaryPhoto } from '@/db/queries/diary';

type PhotoGridProps = { photos: DiaryPhoto[]; isFirst: boolean; onOpen: (index: number) => void };

const columns = ['', 'grid-cols-1', 'grid-cols-2', 'grid-cols-3 grid-rows-2', 'grid-cols-2'];

const isPortrait = ({ widthPx, heightPx }: DiaryPhoto) => heightPx > widthPx;

/** Prints below a note: one large, two side by side, one beside two, or a sheet. Each opens the large view. */
export function PhotoGrid({ photos, isFirst, onOpen }: PhotoGridProps) {
  const [only] = photos;
  if (!only) return null;
  const isSingle = photos.length === 1;
  return (
    <ul
      role="list"
      className={clsx(
        'grid gap-1.5 overflow-hidden rounded-md',
        columns[photos.length] ?? 'grid-cols-2 sm:grid-cols-3',
        isSingle && isPortrait(only) && 'max-w-md',
      )}
    >
      {photos.map((photo, index) => (
        <li key={photo.id} className={clsx(photos.length === 3 && index === 0 && 'col-span-2 row-span-2')}>
          <button
            type="button"
            onClick={() => onOpen(index)}
            aria-label={`${photo.alt || 'Photo from the bench'}. Open large, ${index + 1} of ${photos.length}`}
            className={clsx(
              'block h-full w-full focus-visible:-outline-offset-4',
              !isSingle && 'aspect-[4/3]',
              photos.length === 3 && index === 0 && 'aspect-auto',
            )}
          >
            <PhotoImage
              photo={photo}
              shape={isSingle ? 'natural' : 'cropped'}
              sizes={isSingle ? '(min-width: 64rem) 44rem, 100vw' : '(min-width: 64rem) 22rem, 50vw'}
              isFirst={isFirst && index === 0}
              className="h-full"
            />
          </button>
        </li>
      ))}
    </ul>
  );
}
