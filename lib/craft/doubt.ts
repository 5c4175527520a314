/**
 * What is odd about a value somebody typed: `wrong` cannot be meant and is refused, `ask` is possible and is questioned.
 * The sentence says what is odd and what to do.
 */
export type Doubt = { kind: 'wrong' | 'ask'; sentence: string };

export const wrong = (sentence: string): Doubt => ({ kind: 'wrong', sentence });
export const ask = (sentence: string): Doubt => ({ kind: 'ask', sentence });

/** Whether any of these keeps the value from being stored. */
export const isRefused = (doubts: Doubt[]) => doubts.some((doubt) => doubt.kind === 'wrong');
