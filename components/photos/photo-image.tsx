import { clsx } from 'clsx';
import type { DiaryPhoto } from '@/db/queries/diary';

type Shape = 'natural' | 'cropped';

/** Where the served sizes of a photo lie. */
export const photoHref = (id: string, widthPx: number) => `/api/photos/${id}/${widthPx}`;

function sourceSet({ id, widthsPx }: DiaryPhoto): string {
  return widthsPx
    .split(',')
    .map((width) => `${photoHref(id, Number(width))} ${width}w`)
    .join(', ');
}

type PhotoImageProps = { photo: DiaryPhoto; shape: Shape; sizes: string; isFirst?: boolean; className?: string };

/** A photo that keeps its place while it loads: its own proportions or the grid's, over a blurred hint of itself. */
export function PhotoImage({ photo, shape, sizes, isFirst = false, className }: PhotoImageProps) {
  const fit = shape === 'cropped' ? 'h-full w-full object-cover' : 'h-auto w-full';
  return (
    <span className={clsx('relative block overflow-hidden bg-tint', className)}>
      <img
        src={photo.blur}
        alt=""
        aria-hidden="true"
        className="absolute inset-0 h-full w-full scale-110 object-cover blur-lg"
      />
      <img
        src={photoHref(photo.id, 640)}
        srcSet={sourceSet(photo)}
        sizes={sizes}
        width={photo.widthPx}
        height={photo.heightPx}
        alt={photo.alt || 'Photo from the bench'}
        loading={isFirst ? 'eager' : 'lazy'}
        fetchPriority={isFirst ? 'high' : undefined}
        decoding="async"
        className={clsx('relative block', fit)}
      />
    </span>
  );
}
