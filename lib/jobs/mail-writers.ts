import type { Writer } from './mail-writer';
import { writeChangeAsked, writeChangeDeclined } from './write-changes';
import { writeLetter, writeQuestion } from './write-letter';
import {
  writeHeldEntry,
  writeQuestionDue,
  writeQuestionOverdue,
  writeQuietBuild,
  writeReady,
  writeShipped,
  writeWindowMoved,
} from './write-notices';
import { writeSignOff, writeSignOffAnswered, writeSignOffReminder } from './write-sign-offs';
import { writeInvitation, writeSignIn } from './write-account';
import type { MailKind } from '@/lib/mail/kinds';

/** Who writes which mail. The digest has a writer of its own: it gathers what these say. */
export const mailWriters: Record<Exclude<MailKind, 'digest'>, Writer> = {
  sign_in: writeSignIn,
  invitation: writeInvitation,
  question: writeQuestion,
  letter: writeLetter,
  question_due: writeQuestionDue,
  question_overdue: writeQuestionOverdue,
  sign_off: writeSignOff,
  sign_off_reminder: writeSignOffReminder,
  sign_off_answered: writeSignOffAnswered,
  change_asked: writeChangeAsked,
  change_declined: writeChangeDeclined,
  held_entry: writeHeldEntry,
  quiet_build: writeQuietBuild,
  ready: writeReady,
  shipped: writeShipped,
  window_moved: writeWindowMoved,
};
