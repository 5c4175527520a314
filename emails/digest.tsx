import { requireSubject } from '@/lib/mail/headers';
import { asSentence, counted, countWords } from './count-words';
import { DigestBuildSection, buildInLine, pageCount, type DigestBuild } from './digest-build';
import { Layout } from './layout';
import { TextLink } from './links';
import { Name } from './name';
import { Line, SoftLine, Title } from './prose';

export interface DigestProps {
  readerName: string;
  shopName: string;
  builds: DigestBuild[];
  /** Orders held from view: the mail says that there is news and nothing else. The address must not name the order. */
  held: { url: string }[];
  settingsUrl: string;
  unsubscribeUrl: string;
}

const HELD_NEWS = 'There is something new on one of your orders';

/** What happened, in one line. @throws RangeError when the digest has no news at all */
export function subject({ builds, held }: DigestProps): string {
  const [only, ...others] = builds;
  const pages = builds.reduce((sum, build) => sum + pageCount(build), 0);
  if (only === undefined && held.length === 0) throw new RangeError('a digest without news');
  if (only === undefined) return HELD_NEWS;
  const newPages = asSentence(counted(pages, 'new page'));
  if (others.length > 0) {
    const diaries = `${countWords(builds.length)} diaries`;
    return requireSubject(pages === 0 ? `There is news in ${diaries}` : `${newPages} in ${diaries}`);
  }
  return requireSubject(
    pages === 0 ? `News of ${buildInLine(only)}` : `${newPages} in the diary of ${buildInLine(only)}`,
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
  const { readerName, shopName, builds, held } = props;
  const title = subject(props);
  const preview = builds[0]?.entries[0]?.textExcerpt ?? 'Sign in to read it.';
  return (
    <Layout shopName={shopName} subject={title} preview={preview} footer={<DigestFooter {...props} />}>
      <Title>{title}</Title>
      <Line>
        Hello <Name>{readerName}</Name>,
      </Line>
      {builds.map((build) => (
        <DigestBuildSection key={build.orderNumber} build={build} />
      ))}
      {held.map(({ url }, i) => (
        <Line key={i}>
          {HELD_NEWS}. <TextLink href={url}>Sign in to see it</TextLink>
        </Line>
      ))}
    </Layout>
  );
}
