import type { Writer } from './mail-writer';
import { isLinkLive } from '@/db/queries/mail-content';
import { findShop } from '@/db/queries/shop';
import * as invitation from '@/emails/invitation';
import * as signIn from '@/emails/sign-in';
import { env } from '@/lib/env';

export const writeSignIn: Writer = async (about, _reader, nowMs) => {
  if (!about.signIn || !(await isLinkLive(about.signIn.linkId, nowMs))) return null;
  const { token, code } = about.signIn;
  const link = `${env().APP_URL}/sign-in/open#${token}`;
  const props = { shopName: (await findShop()).name, link, code, minutes: 10 };
  return { subject: signIn.subject(props), url: link, element: <signIn.SignIn {...props} /> };
};

const roleWords = {
  buyer: 'somebody we build for',
  artist: 'an artist we build for',
  builder: 'a builder',
  rep: 'a rep',
  admin: 'an admin',
} as const;

export const writeInvitation: Writer = async (_about, reader) => {
  const shopName = (await findShop()).name;
  const link = `${env().APP_URL}/sign-in?address=${encodeURIComponent(reader.email)}`;
  const { name, role } = reader;
  const props = { name, shopName, roleWords: roleWords[role], inviterName: shopName, link };
  return { subject: invitation.subject(props), url: link, element: <invitation.Invitation {...props} /> };
};
