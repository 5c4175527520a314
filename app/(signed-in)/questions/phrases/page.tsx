import type { Metadata } from 'next';
import { drop, keep } from './actions';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { PhraseForm } from '@/components/questions/phrase-form';
import { PhraseList } from '@/components/questions/phrase-list';
import { listPhrases } from '@/db/queries/phrases';
import { can } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { phraseFields } from '@/lib/questions/phrases';

export const metadata: Metadata = { title: 'Saved phrases' };

export default async function PhrasesPage() {
  const viewer = await pageViewer();
  const phrases = await orNotFound(listPhrases(viewer));
  const mayKeepShop = can(viewer.role, 'none', 'phrase.keep_shop');
  const own = phrases.filter(({ whose }) => whose === 'mine');
  const shop = phrases.filter(({ whose }) => whose === 'shop');
  return (
    <PageFrame
      title="Saved phrases"
      intro={
        <p>
          Sentences for letters, put in by name. Words in braces are filled in for each letter:{' '}
          {phraseFields.map((name) => `{${name}}`).join(', ')}.
        </p>
      }
      tools={
        <PageSection title="A new phrase">
          <PhraseForm keep={keep} mayKeepShop={mayKeepShop} />
        </PageSection>
      }
    >
      <PageSection title="Yours">
        {own.length === 0 ? (
          <p className="text-soft">None yet. What you write often, write once here.</p>
        ) : (
          <PhraseList phrases={own} keep={keep} drop={drop} mayChange mayKeepShop={mayKeepShop} />
        )}
      </PageSection>
      <PageSection title="The shop’s">
        {shop.length === 0 ? (
          <p className="text-soft">None yet. A rep can keep phrases here that everybody uses.</p>
        ) : (
          <PhraseList phrases={shop} keep={keep} drop={drop} mayChange={mayKeepShop} mayKeepShop={mayKeepShop} />
        )}
      </PageSection>
    </PageFrame>
  );
}
