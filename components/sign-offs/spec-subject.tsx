import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { SpecDocument } from '@/lib/specs/document';
import { byGroup, groupName } from '@/lib/specs/groups';
import { allowedWords, type MaterialNames } from '@/lib/specs/item-words';
import { signedWords } from '@/lib/specs/signed-words';

type SpecSubjectProps = { document: SpecDocument; number: number; materials: MaterialNames };

/** Every item of a spec version, as it was written when the version was sent. */
export function SpecSubject({ document, number, materials }: SpecSubjectProps) {
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
                <span className="font-semibold">{signedWords(item, materials)}</span>
              </Cell>
            </Row>
          ))}
        </Table>
      ))}
    </div>
  );
}
