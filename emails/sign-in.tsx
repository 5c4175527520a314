import { requireSubject } from '@/lib/mail/headers';
import { counted } from './count-words';
import { Layout } from './layout';
import { Action } from './links';
import { nameInLine } from './name';
import { light, sans } from './palette';
import { Line, SoftLine, Title } from './prose';

export interface SignInProps {
  shopName: string;
  /** Opens the page with the sign-in button; the token stands in its fragment. */
  link: string;
  code: string;
  /** How long link and code work. */
  minutes: number;
}

export function subject({ shopName }: SignInProps): string {
  return requireSubject(`Your sign-in link for ${nameInLine(shopName)}`);
}

function Code({ children }: { children: string }) {
  const style = { color: light.ink, font: `600 28px/36px ${sans}`, margin: '0 0 20px' };
  return (
    <p className="ink" style={{ ...style, fontVariantNumeric: 'tabular-nums', letterSpacing: '0.12em' }}>
      {children}
    </p>
  );
}

export function SignIn(props: SignInProps) {
  const once = `The link and the code work once, for ${counted(props.minutes, 'minute')}.`;
  const footer = (
    <SoftLine>
      You did not ask for this? Then there is nothing to do: without this mail nobody gets in. The shop never asks you
      for the code.
    </SoftLine>
  );
  return (
    <Layout shopName={props.shopName} subject={subject(props)} preview={once} footer={footer}>
      <Title>Sign in to your build diary</Title>
      <Line>Open the link and press the button on the page it shows.</Line>
      <Action href={props.link}>Go on to sign in</Action>
      <Line>If the page where you asked wants a code, type this one there:</Line>
      <Code>{props.code}</Code>
      <SoftLine>{once}</SoftLine>
    </Layout>
  );
}
