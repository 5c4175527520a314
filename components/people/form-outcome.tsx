import { Notice } from '@/components/ui/notice';
import type { FormState } from '@/lib/form-state';

/**
 * What became of a form, said out loud. Sentences about fields in `shown` stand at those fields; any other sentence, such
 * as one about a hidden field, is said here.
 */
export function FormOutcome({ state, shown = [] }: { state: FormState; shown?: readonly string[] }) {
  if (state.state === 'fresh' || (state.state === 'done' && state.message === '')) return null;
  if (state.state === 'done')
    return (
      <Notice tone="done" role="status">
        {state.message}
      </Notice>
    );
  const unshown = Object.entries(state.fields).filter(([field]) => !shown.includes(field));
  return (
    <Notice tone="late" role="alert">
      {unshown.length > 0 ? unshown.map(([, sentence]) => sentence).join(' ') : state.message}
    </Notice>
  );
}

/** What was refused and typed, or null. */
export const refusalIn = (state: FormState) => (state.state === 'refused' ? state : null);
