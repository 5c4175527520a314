import { requireSubject } from '@/lib/mail/headers';
import { Layout } from './layout';
import { Action } from './links';
import { Name, nameInLine } from './name';
import { Line, SoftLine, Title } from './prose';
import { Quoted, REPLY } from './quoted';

export interface QuestionAskedProps {
  shopName: string;
  orderNumber: string;
  /** Left out, as the excerpt is, while the build is held from view. */
  instrument?: string;
  topic: string;
  askerName: string;
  excerpt?: string;
  /** When the answer is due, in the reader's words: "30 September at 14:00". */
  dueWords?: string;
  url: string;
  /** An answer to the mail itself becomes a letter. */
  repliesArrive?: boolean;
}

export function subject({ askerName, orderNumber, topic }: QuestionAskedProps): string {
  return requireSubject(`${nameInLine(askerName)} asks about ${orderNumber}: ${topic}`);
}

/** To whoever must answer. */
export function QuestionAsked(props: QuestionAskedProps) {
  const { shopName, orderNumber, instrument, topic, askerName, excerpt, dueWords, url, repliesArrive = false } = props;
  const footer = <SoftLine>You get this because you hold the pen: this question waits on you.</SoftLine>;
  return (
    <Layout shopName={shopName} subject={subject(props)} preview={excerpt ?? 'You hold the pen.'} footer={footer}>
      <Title>
        <Name>{askerName}</Name> asks about {orderNumber}
      </Title>
      <SoftLine>
        {instrument !== undefined && (
          <>
            <Name>{instrument}</Name>
            {' · '}
          </>
        )}
        {topic}
      </SoftLine>
      <Quoted waitsOnYou>{excerpt}</Quoted>
      {dueWords !== undefined && <Line>{`An answer is due by ${dueWords}.`}</Line>}
      {repliesArrive && <SoftLine>{REPLY}</SoftLine>}
      <Action href={url}>Answer the question</Action>
    </Layout>
  );
}
