'use client';

import { useEffect, type RefObject } from 'react';
import type { Problem } from './posting-state';

/** Brings the first field that needs another look into view, and the cursor into it: the button is far below it on a phone. */
export function useShowProblem(form: RefObject<HTMLFormElement | null>, problem: Problem | undefined): void {
  useEffect(() => {
    if (!problem || problem.isTouched || Object.values(problem.fields).every((sentence) => !sentence)) return;
    const first = form.current?.querySelector<HTMLElement>('[aria-invalid="true"], [role="alert"]:not(:empty)');
    first?.scrollIntoView({ block: 'center' });
    first?.focus({ preventScroll: true });
  }, [form, problem]);
}
