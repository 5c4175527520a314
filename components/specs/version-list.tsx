import Link from 'next/link';
import type { VersionRow } from '@/db/queries/spec-versions';
import { dayWords } from '@/lib/date-words';

type VersionListProps = {
  versions: VersionRow[];
  isClient: boolean;
  orderNumber: string;
  zone: string;
  nowMs: number;
};

/** The versions that were sent, newest first, and what became of each. */
export function VersionList({ versions, isClient, orderNumber, zone, nowMs }: VersionListProps) {
  return (
    <ol role="list" className="border-t-2 border-ink">
      {versions.map((version, index) => {
        const before = versions[index + 1];
        return (
          <li key={version.id} className="grid gap-x-8 gap-y-1 border-b border-line py-4 md:grid-cols-[9rem_1fr_auto]">
            <p className="heading text-lg">Version {version.number}</p>
            <div>
              <p>{stateWords(version, isClient, zone, nowMs)}</p>
              {version.answer && <p className="mt-1 max-w-[62ch] font-read italic">“{version.answer}”</p>}
              <p className="text-sm text-soft">
                Sent {dayWords(version.sentAt, zone, nowMs)} by <bdi>{version.sentBy}</bdi>
              </p>
            </div>
            {before && (
              <Link
                href={`/builds/${orderNumber}/spec/versions?from=${before.number}&to=${version.number}#compare`}
                aria-label={`What changed from version ${before.number} to version ${version.number}`}
                className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
              >
                What changed
              </Link>
            )}
          </li>
        );
      })}
    </ol>
  );
}

function stateWords(version: VersionRow, isClient: boolean, zone: string, nowMs: number): string {
  const day = version.answeredAt === null ? '' : dayWords(version.answeredAt, zone, nowMs);
  switch (version.state) {
    case 'signed':
      return `Signed ${day} by ${version.signedName}`;
    case 'asked':
      return isClient ? 'Waits for your name' : 'Waits for its owner to sign';
    case 'change_asked':
      return isClient ? 'You asked for a change' : 'The owner asked for a change';
    case 'withdrawn':
      return 'Taken back before it was signed';
    case 'superseded':
      return 'Not signed; a later version took its place';
    default:
      return 'Not put before the owner';
  }
}
