import { requireSubject } from '@/lib/mail/headers';
import { Layout } from './layout';
import { Action } from './links';
import { Name, nameInLine } from './name';
import { SoftLine, Title } from './prose';
import { Quoted, REPLY } from './quoted';

export interface LetterProps {
  shopName: string;
  /** The side that reads it: the owner who asked, or the shop. */
  reader: 'client' | 'shop';
  authorName: string;
  topic: string;
  /** Order, instrument and excerpt are left out while the build is held from view. */
  orderNumber?: string;
  instrument?: string;
  excerpt?: string;
  url: string;
  /** An answer to the mail itself becomes a letter. */
  repliesArrive?: boolean;
}

export function subject({ reader, authorName, orderNumber }: LetterProps): string {
  const author = nameInLine(authorName);
  if (reader === 'client') return requireSubject(`${author} answered your question`);
  return requireSubject(`${author} wrote again about ${orderNumber ?? 'one of your builds'}`);
}

const why = {
  client: 'You get this because you asked the question.',
  shop: 'You get this because you hold the pen: this letter waits on you.',
};

/** One letter of a question, to the side that did not write it. */
export function Letter(props: LetterProps) {
  const { shopName, reader, topic, orderNumber, instrument, excerpt, url, repliesArrive = false } = props;
  const title = subject(props);
  return (
    <Layout
      shopName={shopName}
      subject={title}
      preview={excerpt ?? 'Sign in to read it.'}
      footer={<SoftLine>{why[reader]}</SoftLine>}
    >
      <Title>{title}</Title>
      <SoftLine>
        {instrument !== undefined && (
          <>
            <Name>{instrument}</Name>
            {' · '}
          </>
        )}
        {orderNumber !== undefined && `${orderNumber} · `}
        {topic}
      </SoftLine>
      <Quoted waitsOnYou={reader === 'shop'}>{excerpt}</Quoted>
      {repliesArrive && <SoftLine>{REPLY}</SoftLine>}
      <Action href={url}>{reader === 'client' ? 'Read the letter' : 'Answer the letter'}</Action>
    </Layout>
  );
}
