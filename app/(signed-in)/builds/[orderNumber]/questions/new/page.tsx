import type { Metadata } from 'next';
import { AskForm } from '@/components/questions/ask-form';
import { QuotedEntry } from '@/components/questions/quoted-entry';
import { Notice } from '@/components/ui/notice';
import { requireAskable } from '@/db/queries/question-form';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Ask the shop' };

export default async function AskPage({ params, searchParams }: PageProps<'/builds/[orderNumber]/questions/new'>) {
  const viewer = await pageViewer();
  const { entry: named } = await searchParams;
  const entryId = typeof named === 'string' ? named : null;
  const { orderNumber, topics, entry } = await orNotFound(requireAskable(viewer, (await params).orderNumber, entryId));
  return (
    <div className="mx-auto max-w-[82rem] px-4.5 py-8 md:px-10 md:py-10">
      <div className="grid max-w-[44rem] gap-6">
        <div>
          <p className="narrow text-sm font-semibold text-soft">Order {orderNumber}</p>
          <h1 className="mt-1 text-3xl">Ask the shop</h1>
        </div>
        {entryId && !entry && (
          <Notice>The entry you came from is no longer in the diary. You can ask about the build.</Notice>
        )}
        <AskForm
          orderNumber={orderNumber}
          viewerId={viewer.id}
          topics={topics}
          entryId={entry?.id ?? null}
          quoted={
            entry && (
              <QuotedEntry
                entry={entry}
                orderNumber={orderNumber}
                zone={viewer.timeZone}
                nowMs={requestMs()}
                action={
                  <a
                    href={`/builds/${orderNumber}/questions/new`}
                    className="inline-flex min-h-11 items-center text-sm text-soft underline underline-offset-2 md:min-h-8"
                  >
                    Ask about the build instead
                  </a>
                }
              />
            )
          }
        />
      </div>
    </div>
  );
}
