export const signOffKinds = ['spec', 'drawing', 'sample', 'change', 'concession'] as const;
export type SignOffKind = (typeof signOffKinds)[number];

/** What a concession says, word for word. */
export type Concession = { signed: string; measured: string; reason: string };

/** What a sign-off is of: one of the four, and for a drawing, a sample or a concession the spec item it belongs to. */
export type SignOffSubject = {
  kind: SignOffKind;
  specVersionId?: string;
  documentId?: string;
  changeRequestId?: string;
  itemKey?: string;
  concession?: Concession;
};

const needed = {
  spec: 'specVersionId',
  drawing: 'documentId',
  sample: 'documentId',
  change: 'changeRequestId',
  concession: 'concession',
} as const satisfies Record<SignOffKind, keyof SignOffSubject>;

/** @throws RangeError when a subject names nothing, or something of another kind besides */
export function requireOneSubject(subject: SignOffSubject): void {
  const named = [...new Set(Object.values(needed))].filter((field) => subject[field] !== undefined);
  const hasItem = subject.kind !== 'concession' || Boolean(subject.itemKey);
  if (named.length !== 1 || named[0] !== needed[subject.kind] || !hasItem)
    throw new RangeError(`a sign-off of kind ${subject.kind} names ${named.join(' and ') || 'nothing'}`);
}
