import Link from 'next/link';

export const mailTabs = ['trouble', 'waiting', 'sent', 'bounced', 'dropped', 'replies', 'unreachable'] as const;
export type MailTab = (typeof mailTabs)[number];

const words: Record<MailTab, string> = {
  trouble: 'Needs a look',
  waiting: 'Waiting',
  sent: 'Sent',
  bounced: 'Came back',
  dropped: 'Dropped unsent',
  replies: 'Replies turned away',
  unreachable: 'People not reached',
};

/** The lists of the mail page, side by side. */
export function MailTabs({ current }: { current: MailTab }) {
  return (
    <nav aria-label="Lists of mail" className="border-b border-line">
      <ul role="list" className="relative flex gap-1 overflow-x-auto">
        {mailTabs.map((tab) => (
          <li key={tab}>
            <Link
              href={tab === 'trouble' ? '/access/mail' : `/access/mail?show=${tab}`}
              aria-current={tab === current ? 'page' : undefined}
              className="flex min-h-11 items-center border-b-[3px] border-transparent px-3 whitespace-nowrap text-soft -outline-offset-2 aria-[current]:border-finish-deep aria-[current]:font-semibold aria-[current]:text-ink"
            >
              {words[tab]}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
