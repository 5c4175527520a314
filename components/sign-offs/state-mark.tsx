import { clsx } from 'clsx';
import { stateWords, type SignOffState } from '@/lib/sign-offs/state-words';

/** How a sign-off stands; late is said in words, and coloured. */
export function StateMark({ signOff, today }: { signOff: { state: SignOffState; dueOn: string }; today: string }) {
  const { words, isLate } = stateWords(signOff, today);
  const isOpen = signOff.state === 'asked' || signOff.state === 'change_asked';
  return (
    <span className={clsx('font-semibold', isLate ? 'text-late' : isOpen ? 'text-brass-deep' : 'text-soft')}>
      {words}
    </span>
  );
}
