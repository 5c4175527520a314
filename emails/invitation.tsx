import { requireSubject } from '@/lib/mail/headers';
import { Layout } from './layout';
import { Action } from './links';
import { Name, nameInLine } from './name';
import { Line, SoftLine, Title } from './prose';

export interface InvitationProps {
  name: string;
  shopName: string;
  /** What they are invited as, to follow "as": "the owner of Q-2417", "a builder in the finish room". */
  roleWords: string;
  inviterName: string;
  link: string;
}

export function subject({ inviterName, shopName }: InvitationProps): string {
  return requireSubject(`${nameInLine(inviterName)} invites you to the build diary of ${nameInLine(shopName)}`);
}

export function Invitation(props: InvitationProps) {
  const { name, shopName, roleWords, inviterName, link } = props;
  const footer = (
    <SoftLine>You were not expecting this? Leave it unanswered, and nothing is opened in your name.</SoftLine>
  );
  return (
    <Layout shopName={shopName} subject={subject(props)} preview={`You are invited as ${roleWords}.`} footer={footer}>
      <Title>You are invited to the build diary</Title>
      <Line>
        Hello <Name>{name}</Name>,
      </Line>
      <Line>
        <Name>{inviterName}</Name> has invited you to the build diary of <Name>{shopName}</Name> as {roleWords}.
      </Line>
      <Line>The page behind the button asks whether you accept. Opening it does not sign you in.</Line>
      <Action href={link}>See the invitation</Action>
    </Layout>
  );
}
