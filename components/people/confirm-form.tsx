'use client';

import { useActionState, useRef, useState, type ComponentProps } from 'react';
import { FormOutcome } from './form-outcome';
import { HiddenFields, type HiddenValues } from './hidden-fields';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';

type ConfirmFormProps = {
  send: FormAction;
  values: HiddenValues;
  /** The words of the button that opens the question, and of the one that answers yes. */
  label: string;
  /** Names the opening button where its words would be one of many: "Take Tove off Q-2417". */
  name?: string;
  title: string;
  /** What will happen, and what will not. */
  description: string;
  variant?: ComponentProps<typeof Button>['variant'];
};

/** A button that first says what it will do. Once done, it may be gone from the page, so reading goes on at its top. */
export function ConfirmForm({ send, values, label, name, title, description, variant = 'quiet' }: ConfirmFormProps) {
  const [isOpen, setIsOpen] = useState(false);
  const form = useRef<HTMLFormElement>(null);
  const [state, submit, isSending] = useActionState(async (...sent: Parameters<FormAction>) => {
    const next = await send(...sent);
    if (next.state === 'done') {
      // Nothing behind an open dialog takes focus.
      form.current?.closest('dialog')?.close();
      document.getElementById('main')?.focus();
    }
    return next;
  }, fresh);
  return (
    <>
      <Button variant={variant} onClick={() => setIsOpen(true)} aria-label={name} className="whitespace-nowrap">
        {label}
      </Button>
      <Dialog isOpen={isOpen} onClose={() => setIsOpen(false)} title={title} description={description}>
        <form ref={form} action={submit} className="grid gap-4">
          <HiddenFields values={values} />
          <FormOutcome state={state} />
          <div className="flex flex-wrap justify-end gap-3">
            <Button variant="quiet" onClick={() => setIsOpen(false)}>
              Leave it as it is
            </Button>
            <Button type="submit" variant="danger" disabled={isSending}>
              {label}
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}
