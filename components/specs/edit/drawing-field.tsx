import { PlainSelect } from './plain-fields';
import { useSurroundings } from './surroundings';
import { DrawingLink } from '../drawing-link';
import { PHOTO_COLOUR_SENTENCE } from '@/lib/craft/colour-difference';
import type { LookItem, SpecItem } from '@/lib/specs/document';
import { drawingOf } from '@/lib/specs/drawings';

type DrawingFieldProps = { item: LookItem; say: (item: SpecItem) => void; sentence?: string };

/** Which of the build's drawings and samples says what an item looks like; they come up with what is sent to be signed. */
export function DrawingField({ item, say, sentence }: DrawingFieldProps) {
  const { drawings } = useSurroundings();
  const chosen = drawingOf(item, drawings);
  return (
    <span className="grid grid-cols-[minmax(0,1fr)] items-center gap-2 sm:grid-cols-2">
      <PlainSelect
        label={`${item.label}, drawing or sample`}
        value={item.documentId ?? ''}
        say={(id) => say({ ...item, documentId: id === '' ? null : id })}
        options={drawings.map(({ id, name }) => ({ value: id, label: name }))}
        prompt={drawings.length === 0 ? 'no drawing or sample sent up yet' : 'no drawing or sample'}
        sentence={sentence}
      />
      {chosen && <DrawingLink drawing={chosen} />}
      {chosen?.photoId && !item.colour && <span className="text-sm text-soft">{PHOTO_COLOUR_SENTENCE}</span>}
    </span>
  );
}
