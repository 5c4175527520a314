import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { DrawingLink } from '@/components/specs/drawing-link';
import type { SpecDocument, SpecItem } from '@/lib/specs/document';
import { drawingOf, drawingWords, type Drawing } from '@/lib/specs/drawings';
import { byGroup, groupName } from '@/lib/specs/groups';
import { allowedWords, type MaterialNames } from '@/lib/specs/item-words';
import { signedFigures } from '@/lib/specs/signed-words';

type SpecSubjectProps = {
  document: SpecDocument;
  number: number;
  materials: MaterialNames;
  drawings: readonly Drawing[];
};

/** Every item of a spec version, as it was written when the version was sent. */
export function SpecSubject({ document, number, materials, drawings }: SpecSubjectProps) {
  return (
    <div className="grid gap-8">
      <p className="text-soft">
        Version {number}, {document.items.length} items. What you sign is this, word for word; it never changes
        afterwards.
      </p>
      {byGroup(document.items).map(({ group, items }) => (
        <Table
          key={group}
          caption={groupName(group)}
          isCaptionHidden={false}
          columns={[
            { key: 'item', label: 'Item', className: 'w-2/5' },
            { key: 'value', label: 'What you sign' },
          ]}
        >
          {items.map((item) => (
            <Row key={item.key}>
              <RowHead className="font-normal">{item.label}</RowHead>
              <Cell className="break-words" note={allowedWords(item)}>
                <span className="font-semibold">{signedFigures(item, materials)}</span>
                <DrawingOf item={item} drawings={drawings} />
              </Cell>
            </Row>
          ))}
        </Table>
      ))}
    </div>
  );
}

function DrawingOf({ item, drawings }: { item: SpecItem; drawings: readonly Drawing[] }) {
  const drawing = drawingOf(item, drawings);
  const words = drawingWords(item, drawings);
  if (words === null) return null;
  return <span className="block text-soft">{drawing ? <DrawingLink drawing={drawing} /> : words}</span>;
}
