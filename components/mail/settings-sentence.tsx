import { clockWords, dayWords } from '@/lib/date-words';
import { mailWords, type MailPlan } from '@/lib/mail/plan-words';

type MailSentenceProps = {
  plan: MailPlan;
  side: 'client' | 'shop';
  nextAt: number | null;
  zone: string;
  nowMs: number;
};

/** When the diary comes as things are saved, and the next time in particular. */
export function MailSentence({ plan, side, nextAt, zone, nowMs }: MailSentenceProps) {
  const isAhead = nextAt !== null && nextAt > nowMs && plan.cadence !== 'at_once';
  return (
    <p>
      {mailWords(plan, zone, side)}
      {isAhead && ` The next one can come on ${dayWords(nextAt, zone, nowMs)} at ${clockWords(nextAt, zone)}.`}
    </p>
  );
}
