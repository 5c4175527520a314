'use client';

import { clsx } from 'clsx';
import type { ComponentProps } from 'react';
import { PHOTO_TYPES } from '@/lib/photos/limits';

type PhotoTilesProps = { hasPhotos: boolean; isReading: boolean; onChoose: (files: File[]) => void };

/** The camera where there is a touch screen, and the photos already taken. */
export function PhotoTiles({ hasPhotos, isReading, onChoose }: PhotoTilesProps) {
  return (
    <>
      <Tile capture="environment" disabled={isReading} onChoose={onChoose} className="hidden any-pointer-coarse:grid">
        {hasPhotos ? 'Take another' : 'Take a photo'}
      </Tile>
      <Tile multiple disabled={isReading} onChoose={onChoose} className="grid">
        Choose photos
      </Tile>
    </>
  );
}

type TileProps = ComponentProps<'input'> & { onChoose: (files: File[]) => void };

function Tile({ children, onChoose, className, ...input }: TileProps) {
  return (
    <label
      className={clsx(
        'aspect-square place-items-center rounded-[5px] bg-tint p-2 text-center text-lg leading-tight font-semibold text-finish-deep',
        'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-finish-deep',
        className,
      )}
    >
      <input
        {...input}
        type="file"
        accept={PHOTO_TYPES.join(',')}
        className="sr-only"
        onChange={({ target }) => {
          const files = [...(target.files ?? [])];
          target.value = '';
          if (files.length > 0) onChoose(files);
        }}
      />
      {children}
    </label>
  );
}
