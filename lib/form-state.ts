/** What a form knows about its last sending. */
export type FormState =
  | { state: 'fresh' }
  | { state: 'done'; message: string }
  | { state: 'refused'; message: string; fields: Record<string, string>; values: Record<string, string> };

export const fresh: FormState = { state: 'fresh' };
