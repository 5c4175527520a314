import { useId } from 'react';
import type { BenchPhoto } from './draft-state';
import { NumberBadge } from './photo-thumb';
import { clsx } from 'clsx';
import { controlClass, controlSizes } from '@/components/ui/field';
import { uploadWords } from '@/lib/photos/upload-state';

type PhotoRowProps = {
  photo: BenchPhoto;
  number: number;
  isLocked: boolean;
  onDescribe: (alt: string) => void;
  onRemove: () => void;
  onTryNow: () => void;
};

const linkClass = 'min-h-12 shrink-0 px-2 font-semibold text-finish-deep disabled:opacity-55';

/** What one photo shows, in words; whatever keeps it from the shop; and the way to leave it out. */
export function PhotoRow({ photo, number, isLocked, onDescribe, onRemove, onTryNow }: PhotoRowProps) {
  const id = useId();
  const { upload } = photo;
  const isStuck = upload.step === 'waiting' || upload.step === 'refused' || upload.step === 'failed';
  return (
    <li className="grid grid-cols-[auto_minmax(0,1fr)_auto] items-center gap-x-2.5">
      <NumberBadge number={number} />
      <input
        id={id}
        aria-label={`Photo ${number}: what does it show?`}
        aria-describedby={`${id}-state`}
        placeholder="What does it show?"
        maxLength={300}
        autoComplete="off"
        value={photo.alt}
        disabled={isLocked}
        onChange={({ target }) => onDescribe(target.value)}
        className={clsx(controlClass, controlSizes.bench)}
      />
      <button type="button" disabled={isLocked} onClick={onRemove} className={clsx(linkClass, '-mr-2')}>
        Remove<span className="sr-only"> photo {number}</span>
      </button>
      <div className={clsx('col-span-2 col-start-2', isStuck ? 'flex items-center gap-2' : 'sr-only')}>
        <p
          id={`${id}-state`}
          className={clsx('min-w-0 flex-1 py-1', upload.step === 'waiting' ? 'text-soft' : 'font-semibold text-late')}
        >
          {uploadWords(upload)}
        </p>
        {(upload.step === 'waiting' || upload.step === 'failed') && (
          <button type="button" onClick={onTryNow} className={clsx(linkClass, '-mr-2')}>
            {upload.step === 'failed' ? 'Try again' : 'Try now'}
            <span className="sr-only">: photo {number}</span>
          </button>
        )}
      </div>
    </li>
  );
}
