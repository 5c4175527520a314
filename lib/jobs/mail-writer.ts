import type { ReactElement } from 'react';
import type { MailReader } from '@/db/queries/mail-content';
import type { MailHeaders } from '@/lib/mail/headers';
import type { MailAbout } from '@/lib/mail/kinds';

/** What a mail says to one reader now, before it is put into HTML and text. A digest tells its subject and its link. */
export type Told = {
  subject: string;
  /** Where it leads. */
  url: string;
  element: ReactElement;
  headers?: MailHeaders;
  replyTo?: string;
};

/** Writes one kind of mail; null when there is nothing left that its reader may be told. */
export type Writer = (about: MailAbout, reader: MailReader, nowMs: number) => Promise<Told | null>;
