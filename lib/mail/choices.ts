import type { Role } from '@/lib/access';
import type { MailKind } from '@/lib/mail/kinds';

export const mailChoiceNames = ['at_once', 'digest', 'never'] as const;
export type MailChoice = (typeof mailChoiceNames)[number];

type Rule = {
  /** The kind in a list: "an answer to your question". */
  words: string;
  /** Who gets it at all and may choose how; nobody: it always comes, or is chosen elsewhere. */
  chosenBy: readonly Role[];
  /** How it comes to somebody who has chosen nothing. */
  usual: MailChoice;
};

const owners = ['buyer', 'artist'] as const;
const staff = ['builder', 'rep', 'admin'] as const;
const reps = ['rep', 'admin'] as const;

/** Every kind of mail, in the order of the page where people choose. */
export const mailRules = {
  sign_in: { words: 'a sign-in link', chosenBy: [], usual: 'at_once' },
  invitation: { words: 'an invitation', chosenBy: [], usual: 'at_once' },
  digest: { words: 'diary mail', chosenBy: [], usual: 'at_once' },
  sign_off: { words: 'something to sign', chosenBy: [], usual: 'at_once' },
  sign_off_reminder: { words: 'a reminder to sign', chosenBy: [], usual: 'at_once' },
  question: { words: 'a question that waits on you', chosenBy: staff, usual: 'at_once' },
  letter: { words: 'a new letter about a question', chosenBy: [...owners, ...staff], usual: 'at_once' },
  question_due: { words: 'an answer that is nearly due', chosenBy: staff, usual: 'at_once' },
  question_overdue: { words: 'an answer that is overdue', chosenBy: reps, usual: 'at_once' },
  sign_off_answered: { words: 'an owner’s answer to a sign-off', chosenBy: staff, usual: 'at_once' },
  change_asked: { words: 'a change that an owner asks for', chosenBy: reps, usual: 'at_once' },
  held_entry: { words: 'a page that waits for your release', chosenBy: reps, usual: 'digest' },
  quiet_build: { words: 'a build that has gone quiet', chosenBy: staff, usual: 'digest' },
  change_declined: { words: 'a change that the shop cannot make', chosenBy: owners, usual: 'at_once' },
  ready: { words: 'the day your instrument is ready', chosenBy: owners, usual: 'at_once' },
  shipped: { words: 'your instrument on its way', chosenBy: owners, usual: 'at_once' },
  window_moved: { words: 'a ready window that moved', chosenBy: owners, usual: 'digest' },
} satisfies Record<MailKind, Rule>;

const kinds = Object.keys(mailRules).filter((kind): kind is MailKind => kind in mailRules);

/** The kinds that somebody in this role chooses for, in the order of the page. */
export function choosableKinds(role: Role): MailKind[] {
  return kinds.filter((kind) => mayChoose(role, kind));
}

export function mayChoose(role: Role, kind: MailKind): boolean {
  const chosenBy: readonly Role[] = mailRules[kind].chosenBy;
  return chosenBy.includes(role);
}

/** How this kind comes to somebody with this choice; what cannot be chosen always comes at once. */
export function choiceFor(role: Role, kind: MailKind, chosen: MailChoice | undefined): MailChoice {
  return mayChoose(role, kind) ? (chosen ?? mailRules[kind].usual) : 'at_once';
}
