import { clsx } from 'clsx';
import { memo, useMemo, useState } from 'react';
import { ItemDetails } from './item-details';
import { ItemValue, type Sentences } from './item-value';
import { useSurroundings } from './surroundings';
import type { CanChange } from '@/lib/specs/can-change';
import { checkItem } from '@/lib/specs/check';
import type { SpecItem } from '@/lib/specs/document';
import { drawingWords } from '@/lib/specs/drawings';
import { allowedWords, itemWords } from '@/lib/specs/item-words';

type ItemRowProps = {
  item: SpecItem;
  canChange?: CanChange;
  /** What other fields, or the server, have to say about this one. */
  said?: Sentences;
  suggestion?: string;
  say: (item: SpecItem) => void;
  takeOut: (key: string) => void;
};

/** One item being edited. Drawn anew only when its own item changes, so that typing stays quick in a long spec. */
export const ItemRow = memo(function ItemRow({ item, canChange, said, suggestion, say, takeOut }: ItemRowProps) {
  const [isOpen, setIsOpen] = useState(false);
  const surroundings = useSurroundings();
  const own = useMemo(() => checkItem(item, surroundings), [item, surroundings]);
  const sentences = { ...said, ...own };
  const isHidden = !isOpen && ['label', 'frozenFrom', 'provenAt'].some((field) => sentences[field]);
  if (canChange?.state === 'frozen') return <FrozenRow item={item} words={canChange.words} sentence={said?.value} />;
  return (
    <li className="grid grid-cols-[minmax(0,1fr)] gap-x-5 gap-y-2 border-b border-line py-3 md:grid-cols-[13rem_minmax(0,1fr)_auto]">
      <div className="md:pt-2.5">
        <p className="font-semibold break-words">{item.label || 'Without a name'}</p>
        {canChange && (
          <p className={clsx('text-sm', canChange.state === 'opened' ? 'text-brass-deep' : 'text-soft')}>
            {canChange.words}
          </p>
        )}
      </div>
      <ItemValue item={item} say={say} sentences={sentences} suggestion={suggestion} />
      <button
        type="button"
        aria-expanded={isOpen}
        aria-label={`More about ${item.label}`}
        onClick={() => setIsOpen(!isOpen)}
        className="min-h-11 self-start justify-self-start px-1 text-sm font-semibold text-finish-deep hover:underline"
      >
        {isOpen ? 'Less' : 'More'}
        {isHidden && <span className="text-late"> needs a look</span>}
      </button>
      {isOpen && (
        <div className="md:col-span-2 md:col-start-2">
          <ItemDetails item={item} say={say} takeOut={takeOut} sentences={sentences} />
        </div>
      )}
    </li>
  );
});

function FrozenRow({ item, words, sentence }: { item: SpecItem; words: string; sentence?: string }) {
  const { materialNames, drawings } = useSurroundings();
  return (
    <li className="grid grid-cols-[minmax(0,1fr)] gap-x-5 gap-y-1 border-b border-line py-3 md:grid-cols-[13rem_minmax(0,1fr)]">
      <div>
        <p className="font-semibold break-words">{item.label}</p>
        <p className="text-sm text-soft">{words}</p>
      </div>
      <p>
        {[itemWords(item, 'in', materialNames), allowedWords(item), drawingWords(item, drawings)]
          .filter(Boolean)
          .join(', ')}
        {sentence && <span className="block text-sm font-semibold text-late">{sentence}</span>}
      </p>
    </li>
  );
}
