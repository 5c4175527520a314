import type { ReactNode } from 'react';
import type { SignOffReader } from './sign-off-list';
import { Notice } from '@/components/ui/notice';
import type { SignOffPage } from '@/db/queries/sign-offs';
import { clockWords, dayWords } from '@/lib/date-words';
import { shortHash } from '@/lib/sign-offs/hash-words';

type RecordProps = { signOff: SignOffPage; reader: SignOffReader };

/** Who said what to it, and when. */
export function Answered({ signOff, reader: { zone, nowMs } }: RecordProps) {
  const { state, answeredAt, signedName, answeredBy, answer } = signOff;
  if (answeredAt === null) return null;
  const when = `${dayWords(answeredAt, zone, nowMs)} at ${clockWords(answeredAt, zone)}`;
  if (state === 'signed')
    return (
      <Notice tone="done" title="Signed">
        <bdi className="font-read text-lg italic">{signedName}</bdi>, on {when}
      </Notice>
    );
  if (answer !== null)
    return (
      <Notice tone="brass" title="A change was asked for">
        <p className="font-read break-words whitespace-pre-line text-ink">{answer}</p>
        <p className="mt-1">
          <bdi>{answeredBy}</bdi>, on {when}
        </p>
      </Notice>
    );
  return null;
}

/** What fixes the thing that is signed: the start of its hash to compare by eye, the whole of it for the record. */
export function ContentMark({ signOff, reader: { zone, nowMs } }: RecordProps) {
  return (
    <dl className="grid gap-3 text-sm">
      <Fact name="Sent by">
        <bdi>{signOff.askedBy}</bdi>, {dayWords(signOff.askedAt, zone, nowMs)} at {clockWords(signOff.askedAt, zone)}
      </Fact>
      <Fact name="Fingerprint of what is signed">
        <span className="tabular-nums">{shortHash(signOff.contentHash)}</span>
        <details className="mt-1">
          <summary className="inline-flex min-h-11 cursor-pointer items-center font-semibold text-finish-deep">
            The whole of it
          </summary>
          <code className="text-xs break-all text-soft">SHA-256 {signOff.contentHash}</code>
        </details>
      </Fact>
    </dl>
  );
}

function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div>
      <dt className="text-soft">{name}</dt>
      <dd>{children}</dd>
    </div>
  );
}
