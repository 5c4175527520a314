import { addDays } from '@/lib/schedule/days';

/** A reminder goes out so many days before the day to sign by. */
export const REMINDER_DAYS = 2;

/**
 * Whether today, yyyy-mm-dd, is a day to remind: two days ahead, or on the day itself when it was asked for later than
 * that. Who was asked today knows already. A reminder that was missed is still due afterwards.
 */
export function isReminderDue({ dueOn, askedOn }: { dueOn: string; askedOn: string }, today: string): boolean {
  const ahead = addDays(dueOn, -REMINDER_DAYS);
  const remindOn = askedOn < ahead ? ahead : dueOn;
  return askedOn < remindOn && today >= remindOn;
}
