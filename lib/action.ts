import 'server-only';
import { headers } from 'next/headers';
import type { z } from 'zod';
import { noteRefusal, requireRoom, requireViewer } from '@/lib/auth/door';
import { isSameOrigin } from '@/lib/auth/origin';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import type { FormState } from '@/lib/form-state';
import { logFault } from '@/lib/log';
import type { LimitName } from '@/lib/rate-limits';
import { fieldSentences, refusalOf } from '@/lib/refusal';
import type { SessionViewer } from '@/db/queries/sessions';

export type FormAction = (previous: FormState, form: FormData) => Promise<FormState>;

type Outcome = string | void;

/**
 * A form's door: own pages only, signed in, input checked, limit taken. What was typed goes back with every refusal.
 * `run` may return a sentence that tells what happened.
 */
export function action<S extends z.ZodType>(
  schema: S,
  run: (viewer: SessionViewer, input: z.output<S>) => Promise<Outcome>,
  limit: LimitName = 'manage',
): FormAction {
  return (_previous, form) =>
    settle(form, async () => {
      await requireOwnForm();
      const viewer = await requireViewer();
      const input = parseForm(schema, form);
      await requireRoom(limit, viewer.id);
      return run(viewer, input);
    });
}

/** The same for somebody who is not signed in yet; the work counts its own limits. */
export function openAction<S extends z.ZodType>(schema: S, run: (input: z.output<S>) => Promise<Outcome>): FormAction {
  return (_previous, form) =>
    settle(form, async () => {
      await requireOwnForm();
      return run(parseForm(schema, form));
    });
}

async function requireOwnForm() {
  if (!isSameOrigin(await headers()))
    throw new Denied('not_allowed', 'This can only be sent from the diary’s own pages.');
}

function parseForm<S extends z.ZodType>(schema: S, form: FormData): z.output<S> {
  const result = schema.safeParse(typedValues(form));
  if (!result.success) throw new BadInput(fieldSentences(result.error.issues));
  return result.data;
}

function typedValues(form: FormData): Record<string, string> {
  const values: Record<string, string> = {};
  for (const [key, value] of form) if (typeof value === 'string' && !key.startsWith('$')) values[key] = value;
  return values;
}

async function settle(form: FormData, work: () => Promise<Outcome>): Promise<FormState> {
  try {
    return { state: 'done', message: (await work()) ?? '' };
  } catch (error) {
    if (error instanceof OutOfReach) await noteRefusal(error);
    const refusal = refusalOf(error);
    if (!refusal && isNextSignal(error)) throw error;
    if (!refusal) logFault(error);
    const message = refusal?.message ?? 'Something broke on our side. It has been written down; please try again.';
    return { state: 'refused', message, fields: refusal?.fields ?? {}, values: typedValues(form) };
  }
}

/** Redirects travel as thrown signals. */
function isNextSignal(error: unknown): boolean {
  return error instanceof Error && 'digest' in error && String(error.digest).startsWith('NEXT_');
}
