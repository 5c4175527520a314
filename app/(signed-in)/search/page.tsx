import type { Metadata } from 'next';
import { FoundList } from '@/components/search/found-list';
import { SearchBox } from '@/components/search/search-box';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { searchAll } from '@/db/queries/search';
import { isStaffRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Search' };

const placeIn = (text: unknown) => (typeof text === 'string' && /^\d{1,15}$/.test(text) ? Number(text) : null);

export default async function SearchPage({ searchParams }: PageProps<'/search'>) {
  const viewer = await pageViewer();
  const { words: asked, before } = await searchParams;
  const typed = typeof asked === 'string' ? asked.slice(0, 400) : '';
  const found = await searchAll(viewer, typed, placeIn(before));
  const where = isStaffRole(viewer.role) ? 'the diaries and letters of your builds' : 'your diaries and letters';
  return (
    <div className="mx-auto grid max-w-[82rem] gap-6 px-4.5 py-8 md:px-10 md:py-10">
      <h1 className="text-3xl">Search</h1>
      <SearchBox typed={typed} where={where} />
      {found.words.length > 0 && found.hits.length === 0 && (
        <EmptyState title="Nothing with these words">
          All of the words must be in one entry or one letter. Try fewer of them, or the beginning of one.
        </EmptyState>
      )}
      {found.hits.length > 0 && <FoundList hits={found.hits} zone={viewer.timeZone} nowMs={requestMs()} />}
      {found.next !== null && (
        <div>
          <LinkButton
            variant="quiet"
            href={{ query: { words: typed, before: String(found.next) } }}
            className="min-h-11"
          >
            Show what is older
          </LinkButton>
        </div>
      )}
    </div>
  );
}
