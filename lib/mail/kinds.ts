export const mailKinds = [
  'sign_in',
  'invitation',
  'digest',
  'question',
  'letter',
  'question_due',
  'question_overdue',
  'sign_off',
  'sign_off_reminder',
  'sign_off_answered',
  'change_asked',
  'change_declined',
  'held_entry',
  'quiet_build',
  'ready',
  'shipped',
  'window_moved',
] as const;
export type MailKind = (typeof mailKinds)[number];

/** What a mail tells of, by id; the sender reads the rest with the rights of the mail's reader. */
export type MailAbout = {
  entryIds?: string[];
  /** What a digest tells beside entries. */
  newsIds?: string[];
  questionId?: string;
  letterId?: string;
  inviterId?: string;
  signOffId?: string;
  /** A change request. */
  changeId?: string;
  buildId?: string;
  /** The day of a ready window, yyyy-mm-dd. */
  givenOn?: string;
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
  replyTo?: string;
  photos: { key: string; contentId: string }[];
  about: MailAbout;
};
