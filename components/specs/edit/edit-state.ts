import { isSame } from '@/lib/specs/canonical';
import type { SpecDocument, SpecItem } from '@/lib/specs/document';
import { mergeSpecs, type Merge } from '@/lib/specs/merge';

export type Saved = { document: SpecDocument; revision: number; editedBy: string };

export type EditState = {
  /** What is saved, as far as this page knows. */
  saved: Saved;
  document: SpecDocument;
  /** The very document that is known to be saved: another one holds something that is not. */
  clean: SpecDocument;
  /** What went out with the last saving. */
  sent: SpecDocument | null;
  /** What somebody else saved meanwhile, until it is looked at. */
  meanwhile: { by: string; takenKeys: string[]; clashes: Merge['clashes'] } | null;
};

export type Edit =
  | { kind: 'say'; item: SpecItem }
  | { kind: 'add'; items: SpecItem[]; behindKey?: string }
  | { kind: 'take out'; keys: string[] }
  | { kind: 'send' }
  | { kind: 'saved elsewhere or here'; saved: Saved }
  | { kind: 'take theirs'; key: string }
  | { kind: 'seen' };

export const startOf = (saved: Saved): EditState => ({
  saved,
  document: saved.document,
  clean: saved.document,
  sent: null,
  meanwhile: null,
});

export function edit(state: EditState, change: Edit): EditState {
  const { items } = state.document;
  const having = (next: SpecItem[]): EditState => ({ ...state, document: { items: next } });
  switch (change.kind) {
    case 'say':
      return having(items.map((item) => (item.key === change.item.key ? change.item : item)));
    case 'add': {
      const at = items.findIndex(({ key }) => key === change.behindKey) + 1 || items.length;
      return having(items.toSpliced(at, 0, ...change.items));
    }
    case 'take out':
      return having(items.filter(({ key }) => !change.keys.includes(key)));
    case 'send':
      return { ...state, sent: state.document };
    case 'saved elsewhere or here':
      return arrive(state, change.saved);
    case 'take theirs':
      return takeTheirs(state, change.key);
    case 'seen':
      return { ...state, meanwhile: null };
  }
}

/** A later revision has come: what this page sent itself, or what somebody else saved. */
function arrive(state: EditState, saved: Saved): EditState {
  if (state.sent && isSame(saved.document, state.sent)) return { ...state, saved, clean: state.sent, sent: null };
  const { merged, takenKeys, clashes } = mergeSpecs(state.saved.document, state.document, saved.document);
  return {
    saved,
    document: merged,
    clean: saved.document,
    sent: null,
    meanwhile: { by: saved.editedBy, takenKeys, clashes },
  };
}

function takeTheirs(state: EditState, key: string): EditState {
  const { meanwhile, document } = state;
  const theirs = meanwhile?.clashes.find((clash) => clash.key === key)?.theirs ?? null;
  const isThere = document.items.some((item) => item.key === key);
  const kept = document.items.flatMap((item) => (item.key === key ? (theirs ?? []) : [item]));
  return {
    ...state,
    document: { items: !isThere && theirs ? [...kept, theirs] : kept },
    meanwhile: meanwhile && { ...meanwhile, clashes: meanwhile.clashes.filter((clash) => clash.key !== key) },
  };
}
