'use client';

import { useState } from 'react';
import { LargeView } from '@/components/photos/large-view';
import { PhotoGrid } from '@/components/photos/photo-grid';
import type { DiaryPhoto } from '@/db/queries/diary';

/** The photos of a letter, as prints below it; each opens large. */
export function LetterPrints({ photos }: { photos: DiaryPhoto[] }) {
  const [openAt, setOpenAt] = useState<number | null>(null);
  if (photos.length === 0) return null;
  return (
    <>
      <PhotoGrid photos={photos} isFirst={false} onOpen={setOpenAt} />
      {openAt !== null && <LargeView photos={photos} startAt={openAt} onClose={() => setOpenAt(null)} />}
    </>
  );
}
