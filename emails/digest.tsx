import { requireSubject } from '@/lib/mail/headers';
import { asSentence, counted, countWords } from './count-words';
import { DigestBuildSection, buildInLine, pageCount, type DigestBuild } from './digest-build';
import { Layout } from './layout';
import { TextLink } from './links';
import { Name } from './name';
import { Line, SoftLine, Title } from './prose';

/** Something that happened beside new pages, in the words its own mail would have as its subject. */
export interface DigestNews {
  words: string;
  url: string;
}

export interface DigestProps {
  readerName: string;
  shopName: string;
  news: DigestNews[];
  builds: DigestBuild[];
  /** Orders held from view: the mail says that there is news and nothing else. The address must not name the order. */
  held: { url: string }[];
  /** The reader's time zone, when no clock of this machine knows it any more. */
  lostZone?: string;
  settingsUrl: string;
  unsubscribeUrl: string;
}

const HELD_NEWS = 'There is something new on one of your orders';

/** The new pages, in one line; null when there are none. */
function pagesLine({ builds, held }: DigestProps): string | null {
  const [only, ...others] = builds;
  const pages = builds.reduce((sum, build) => sum + pageCount(build), 0);
  if (only === undefined) return held.length > 0 ? HELD_NEWS : null;
  const newPages = asSentence(counted(pages, 'new page'));
  if (others.length > 0) {
    const diaries = `${countWords(builds.length)} diaries`;
    return pages === 0 ? `There is news in ${diaries}` : `${newPages} in ${diaries}`;
  }
  return pages === 0 ? `News of ${buildInLine(only)}` : `${newPages} in the diary of ${buildInLine(only)}`;
}

const asClause = (sentence: string) => sentence.charAt(0).toLowerCase() + sentence.slice(1);

/** What happened, in one line. @throws RangeError when the digest has no news at all */
export function subject(props: DigestProps): string {
  const pages = pagesLine(props);
  const [first, ...more] = props.news;
  if (first === undefined) {
    if (pages === null) throw new RangeError('a digest without news');
    return requireSubject(pages);
  }
  if (pages === null && more.length === 0) return requireSubject(first.words);
  if (pages === null) return requireSubject(`${first.words}, and ${counted(more.length, 'more thing')}`);
  if (more.length === 0) return requireSubject(`${first.words}, and ${asClause(pages)}`);
  return requireSubject(`${pages}, and ${counted(props.news.length, 'more thing')}`);
}

function News({ news }: Pick<DigestProps, 'news'>) {
  return news.map(({ words, url }) => (
    <Line key={`${words} ${url}`}>
      {words}. <TextLink href={url}>Open it</TextLink>
    </Line>
  ));
}

function LostZone({ zone }: { zone: string }) {
  return (
    <Line>
      Our clocks no longer know the time zone <Name>{zone}</Name>, so your mail comes by UTC for now. Choose where you
      are again under your settings.
    </Line>
  );
}

function DigestFooter({ settingsUrl, unsubscribeUrl }: Pick<DigestProps, 'settingsUrl' | 'unsubscribeUrl'>) {
  return (
    <>
      <SoftLine>You get this because you asked for mail when there is something new.</SoftLine>
      <SoftLine>
        <TextLink href={settingsUrl}>Change when mail comes</TextLink>
      </SoftLine>
      <SoftLine>
        <TextLink href={unsubscribeUrl}>Stop these mails</TextLink>
      </SoftLine>
    </>
  );
}

export function Digest(props: DigestProps) {
  const { readerName, shopName, news, builds, held, lostZone } = props;
  const title = subject(props);
  const preview = builds[0]?.entries[0]?.textExcerpt || news[0]?.words || 'Sign in to read it.';
  return (
    <Layout shopName={shopName} subject={title} preview={preview} footer={<DigestFooter {...props} />}>
      <Title>{title}</Title>
      <Line>
        Hello <Name>{readerName}</Name>,
      </Line>
      <News news={news} />
      {builds.map((build) => (
        <DigestBuildSection key={build.orderNumber} build={build} />
      ))}
      {held.map(({ url }, i) => (
        <Line key={i}>
          {HELD_NEWS}. <TextLink href={url}>Sign in to see it</TextLink>
        </Line>
      ))}
      {lostZone !== undefined && <LostZone zone={lostZone} />}
    </Layout>
  );
}
