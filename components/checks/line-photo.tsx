'use client';

import { useLinePhoto } from './use-line-photo';
import { photoHref } from '@/components/photos/photo-image';
import { ProgressBar } from '@/components/ui/progress-bar';
import { PHOTO_TYPES } from '@/lib/photos/limits';
import { isGoingUp, shareDone, uploadWords } from '@/lib/photos/upload-state';

type LinePhotoProps = {
  orderNumber: string;
  lineText: string;
  photoId: string | null;
  isNeeded: boolean;
  onReady: (photoId: string) => void;
};

/** Takes the photo of a line, shows how far it is, and the photo once it is there. */
export function LinePhoto({ orderNumber, lineText, photoId, isNeeded, onReady }: LinePhotoProps) {
  const { upload, refusal, choose } = useLinePhoto(orderNumber, onReady);
  const words = photoId !== null ? 'Take another photo' : isNeeded ? 'Take the photo' : 'Add a photo';
  return (
    <div className="grid gap-2">
      <div className="flex items-center gap-3">
        {photoId !== null && (
          <img
            src={photoHref(photoId, 320)}
            alt={`Photo: ${lineText}`}
            width={64}
            height={48}
            className="h-12 w-16 rounded object-cover"
          />
        )}
        <label className="inline-flex min-h-12 items-center rounded-[5px] bg-tint px-4 font-semibold text-finish-deep has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-finish-deep">
          <input
            type="file"
            accept={PHOTO_TYPES.join(',')}
            capture="environment"
            className="sr-only"
            onChange={({ target }) => {
              const [file] = target.files ?? [];
              target.value = '';
              if (file) void choose(file);
            }}
          />
          {words}
          <span className="sr-only">: {lineText}</span>
        </label>
      </div>
      {upload && isGoingUp(upload) && (
        <ProgressBar share={shareDone(upload)} label={`Photo of ${lineText} on its way`} />
      )}
      <p role="status" className="text-sm text-soft empty:hidden">
        {upload && upload.step !== 'ready' && uploadWords(upload)}
      </p>
      <p role="alert" className="text-sm font-semibold text-late empty:hidden">
        {refusal}
      </p>
    </div>
  );
}
