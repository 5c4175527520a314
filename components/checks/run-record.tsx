import { clsx } from 'clsx';
import { photoHref } from '@/components/photos/photo-image';
import type { CheckRun } from '@/db/queries/checks';
import { clockWords, dayWords } from '@/lib/date-words';
import type { CheckMark } from '@/lib/validation/checks';

const words: Record<CheckMark, string> = { pass: 'Pass', fail: 'Fail', not_applicable: 'Not here' };

/** A finished walk through a list, as it was marked. */
export function RunRecord({ run, zone, nowMs }: { run: CheckRun; zone: string; nowMs: number }) {
  return (
    <ol role="list" className="border-t-2 border-ink">
      {run.lines.map((line, index) => (
        <li key={line.id} className="grid gap-1 border-b border-line py-4">
          <p>
            <span className="narrow mr-2 text-soft">{index + 1}</span>
            {line.text}
          </p>
          <p className={clsx('font-semibold', line.mark === 'fail' && 'text-late')}>
            {line.mark && words[line.mark]}
            {line.note && <span className="font-normal">: {line.note}</span>}
          </p>
          {line.photoId !== null && (
            <a href={photoHref(line.photoId, 2048)}>
              <img
                src={photoHref(line.photoId, 320)}
                alt={`Photo: ${line.text}`}
                width={128}
                height={96}
                loading="lazy"
                className="h-24 w-32 rounded object-cover"
              />
            </a>
          )}
          {line.markedAt !== null && (
            <p className="text-sm text-soft">
              <bdi>{line.markedBy}</bdi>, {dayWords(line.markedAt, zone, nowMs)} {clockWords(line.markedAt, zone)}
            </p>
          )}
        </li>
      ))}
    </ol>
  );
}
