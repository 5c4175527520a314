import { requireSubject } from '@/lib/mail/headers';
import { Layout } from './layout';
import { Action } from './links';
import { Name } from './name';
import { Line, SoftLine, Title } from './prose';
import { Quoted } from './quoted';

export interface NoticeProps {
  shopName: string;
  /** What happened; names in it are isolated with `nameInLine`. */
  title: string;
  /** Which build it is about; left out while it is held from view. */
  build?: { orderNumber: string; instrument: string };
  /** Sentences of the shop's own. */
  lines: string[];
  /** Somebody's own words. */
  quoted?: string;
  /** Marks the words in brass: they wait on the reader. */
  waitsOnYou?: boolean;
  action: string;
  url: string;
  /** Why the reader gets this. */
  why: string;
}

export const subject = ({ title }: NoticeProps) => requireSubject(title);

/** A mail that says one thing that happened, and leads to where it is read or done. */
export function Notice(props: NoticeProps) {
  const { shopName, title, build, lines, quoted, waitsOnYou = false, action, url, why } = props;
  const preview = quoted ?? lines[0] ?? 'Sign in to read it.';
  return (
    <Layout shopName={shopName} subject={subject(props)} preview={preview} footer={<SoftLine>{why}</SoftLine>}>
      <Title>{title}</Title>
      {build && (
        <SoftLine>
          <Name>{build.instrument}</Name>
          {` · ${build.orderNumber}`}
        </SoftLine>
      )}
      {lines.map((line) => (
        <Line key={line}>{line}</Line>
      ))}
      {quoted !== undefined && <Quoted waitsOnYou={waitsOnYou}>{quoted}</Quoted>}
      <Action href={url}>{action}</Action>
    </Layout>
  );
}
