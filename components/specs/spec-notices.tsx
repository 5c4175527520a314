import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import type { ChangeRequestRow } from '@/db/queries/change-requests';
import type { Draft } from '@/db/queries/spec-drafts';
import type { VersionRow } from '@/db/queries/spec-versions';
import { dayWords } from '@/lib/date-words';
import { isSame } from '@/lib/specs/canonical';
import type { SpecDocument } from '@/lib/specs/document';

type SpecNoticesProps = {
  orderNumber: string;
  versions: VersionRow[];
  shownNumber: number | null;
  changes: ChangeRequestRow[];
  isOwner: boolean;
  /** For staff. */
  draft: Draft | null;
  sentDocument: SpecDocument | null;
  zone: string;
  nowMs: number;
};

const linkClass = 'inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline';

/** What is under way around the version that counts. */
export function SpecNotices(props: SpecNoticesProps) {
  const { orderNumber, changes, isOwner, draft, sentDocument } = props;
  const path = `/builds/${orderNumber}/spec`;
  const waiting = changes.filter(({ state }) => state === 'asked' || state === 'offered');
  return (
    <div className="mb-8 grid gap-4 empty:hidden">
      <Newest {...props} />
      {waiting.length > 0 && (
        <Notice
          tone={isOwner === waiting.some(({ state }) => state === 'offered') ? 'brass' : 'plain'}
          title={waiting.length === 1 ? 'A change is asked for' : `${waiting.length} changes are asked for`}
          action={
            <Link href={`${path}/changes`} className={linkClass}>
              See the changes
            </Link>
          }
        >
          {waiting[0]?.wish}
        </Notice>
      )}
      {draft && sentDocument && !isSame(draft.document, sentDocument) && (
        <Notice
          title="The draft differs from what was sent"
          action={
            <Link href={`${path}/versions?to=draft`} className={linkClass}>
              See the difference
            </Link>
          }
        >
          {draft.editedBy} saved it last. Only the shop sees it.
        </Notice>
      )}
    </div>
  );
}

/** The newest version, when it is not a signed one. */
function Newest({ orderNumber, versions, shownNumber, isOwner, zone, nowMs }: SpecNoticesProps) {
  const [newest] = versions;
  if (!newest || newest.state === 'signed') return null;
  const others = versions.length > 1;
  const compare = others && (
    <Link href={`/builds/${orderNumber}/spec/versions`} className={linkClass}>
      See what changes
    </Link>
  );
  const sign = (
    <Link
      href={`/builds/${orderNumber}/sign-offs${newest.signOffId ? `/${newest.signOffId}` : ''}`}
      className={linkClass}
    >
      {isOwner ? 'Read and sign it' : 'See the sign-off'}
    </Link>
  );
  if (newest.state === 'change_asked')
    return (
      <Notice title={`A change to version ${newest.number} is asked for`} action={compare}>
        {newest.answer}
      </Notice>
    );
  const instead = newest.number !== shownNumber ? ` Until then version ${shownNumber} counts.` : '';
  return (
    <Notice
      tone="brass"
      title={isOwner ? `Version ${newest.number} waits for your name` : `Version ${newest.number} waits for its owner`}
      action={
        <span className="flex flex-wrap gap-x-6">
          {sign}
          {compare}
        </span>
      }
    >
      Sent {dayWords(newest.sentAt, zone, nowMs)} by {newest.sentBy}.{instead}
    </Notice>
  );
}
