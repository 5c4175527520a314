export const mailKinds = ['sign_in', 'invitation', 'digest', 'question', 'letter'] as const;
export type MailKind = (typeof mailKinds)[number];

/** What a mail tells of, by id; the sender reads the rest with the rights of the mail's reader. */
export type MailAbout = {
  entryIds?: string[];
  questionId?: string;
  letterId?: string;
  inviterId?: string;
  /** Only until the mail is sent: the secret half of a sign-in link. */
  signIn?: { linkId: string; token: string; code: string };
};

/** A mail's bytes, the same at every try. Photos are kept by reference and read from the store again. */
export type FrozenMail = {
  to: string;
  subject: string;
  html: string;
  text: string;
  headers: Record<string, string>;
  photos: { key: string; contentId: string }[];
  about: MailAbout;
};
