'use client';

import { useEffect, useMemo, useState } from 'react';
import useSWRInfinite from 'swr/infinite';
import { DiarySection } from './diary-section';
import { fetchPage, rememberPage } from './fetch-page';
import { byStage } from './sections';
import type { EntryView } from './entry';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice } from '@/components/ui/notice';
import type { DiaryPage } from '@/db/queries/diary';

/** A new entry shows within this time on an open page; each look costs a 304 while nothing has changed. */
const LOOK_EVERY_MS = 10_000;

type DiaryFeedProps = EntryView & {
  first: DiaryPage;
  etag: string;
  viewerKey: string;
  stageNotes: Record<string, string>;
};

export function DiaryFeed({ first, etag, viewerKey, stageNotes, ...view }: DiaryFeedProps) {
  const base = `/api/builds/${encodeURIComponent(view.orderNumber)}/diary`;
  useState(() => rememberPage(base, etag, first));
  const keyOf = (index: number, above: DiaryPage | null) => {
    if (index === 0) return [base, viewerKey];
    return above?.next ? [`${base}?before=${above.next}`, viewerKey] : null;
  };
  const { data, error, size, setSize, isValidating } = useSWRInfinite<DiaryPage, Error>(
    keyOf,
    ([url]: string[]) => fetchPage(url ?? base),
    {
      fallbackData: [first],
      refreshInterval: LOOK_EVERY_MS,
      revalidateOnFocus: true,
      revalidateAll: true,
      dedupingInterval: 1000,
      focusThrottleInterval: 1000,
    },
  );
  const pages = useMemo(() => data ?? [first], [data, first]);
  const sections = useMemo(() => byStage(pages.flatMap((page) => page.entries)), [pages]);
  useVisit(view.orderNumber, pages[0]?.entries[0]?.id);

  if (sections.length === 0) return <NothingYet />;
  const isMore = pages.at(-1)?.next !== null;
  return (
    <div>
      {error && (
        <Notice role="status" className="mb-6">
          The shop cannot be reached just now. What is shown here is from the last time it could; it tries again by
          itself.
        </Notice>
      )}
      {sections.map((section, index) => (
        <DiarySection
          key={section.entries[0]?.id}
          section={section}
          note={stageNotes[section.stage]}
          isFirst={index === 0}
          {...view}
        />
      ))}
      {isMore && (
        <Button variant="quiet" disabled={isValidating && size > pages.length} onClick={() => setSize(size + 1)}>
          Show older pages
        </Button>
      )}
    </div>
  );
}

function NothingYet() {
  return (
    <EmptyState title="The first page is still white">
      As soon as the bench posts something, it stands here. You need not reload.
    </EmptyState>
  );
}

/** Tells the shop that its newest page is on the reader's screen. */
function useVisit(orderNumber: string, newestId: string | undefined) {
  useEffect(() => {
    const tell = () => {
      if (document.visibilityState !== 'visible') return;
      void fetch(`/api/builds/${encodeURIComponent(orderNumber)}/visits`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: '{}',
      }).catch(() => undefined);
    };
    const timer = setTimeout(tell, 1500);
    return () => clearTimeout(timer);
  }, [orderNumber, newestId]);
}
