import { useEffect, useRef } from 'react';
import { useSurroundings } from './surroundings';
import type { EditState } from './edit-state';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { SpecDocument, SpecItem } from '@/lib/specs/document';
import { drawingWords } from '@/lib/specs/drawings';
import { allowedWords, itemWords } from '@/lib/specs/item-words';

type MeanwhileProps = {
  meanwhile: NonNullable<EditState['meanwhile']>;
  document: SpecDocument;
  takeTheirs: (key: string) => void;
  seen: () => void;
};

/** Somebody else saved this spec: what came over from them, and what both have changed. */
export function Meanwhile({ meanwhile: { by, takenKeys, clashes }, document, takeTheirs, seen }: MeanwhileProps) {
  const { materialNames, drawings } = useSurroundings();
  const place = useRef<HTMLDivElement>(null);
  // Whoever saved stands at the foot of a long form; what has to be looked at stands at its head.
  useEffect(() => place.current?.focus(), []);
  const labels = new Map(document.items.map(({ key, label }) => [key, label]));
  const words = (item: SpecItem | null) =>
    item
      ? [itemWords(item, 'in', materialNames), allowedWords(item), drawingWords(item, drawings)]
          .filter(Boolean)
          .join(', ')
      : 'taken out';
  return (
    <div ref={place} tabIndex={-1} className="scroll-mt-64">
      <Notice
        tone="brass"
        role="status"
        title={`${by} has saved this spec meanwhile`}
        action={
          <Button variant="quiet" onClick={seen}>
            {clashes.length > 0 ? 'Keep what I typed for the rest' : 'Go on'}
          </Button>
        }
      >
        <p>Nothing you typed is lost. Look it over, then save again.</p>
        {takenKeys.length > 0 && (
          <p className="mt-2">Taken over: {takenKeys.map((key) => labels.get(key) ?? key).join(', ')}.</p>
        )}
        {clashes.length > 0 && (
          <ul role="list" className="mt-3 grid gap-3">
            {clashes.map(({ key, mine, theirs }) => (
              <li key={key} className="grid justify-items-start gap-1 border-t border-line pt-2">
                <span className="font-semibold">{(mine ?? theirs)?.label ?? key}</span>
                <span>
                  yours: {words(document.items.find((item) => item.key === key) ?? null)}; theirs: {words(theirs)}
                </span>
                <Button variant="quiet" onClick={() => takeTheirs(key)}>
                  Take theirs
                </Button>
              </li>
            ))}
          </ul>
        )}
      </Notice>
    </div>
  );
}
