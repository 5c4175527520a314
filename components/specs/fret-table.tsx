import { Table, Row } from '@/components/ui/table';
import { fretName, scaleWords, slotWords } from '@/lib/craft/fret-words';
import type { FretRow, FretTable as Slots } from '@/lib/craft/fret-table';

const columnsOfOne = [
  { key: 'fret', label: 'Fret' },
  { key: 'in', label: 'From the nut, in', isNumeric: true },
  { key: 'mm', label: 'From the nut, mm', isNumeric: true },
];

const columnsOfTwo = [
  { key: 'fret', label: 'Fret' },
  { key: 'bass-in', label: 'Bass side, in', isNumeric: true },
  { key: 'bass-mm', label: 'mm', isNumeric: true },
  { key: 'treble-in', label: 'Treble side, in', isNumeric: true },
  { key: 'treble-mm', label: 'mm', isNumeric: true },
  { key: 'skew-in', label: 'Skew, in', isNumeric: true },
  { key: 'skew-mm', label: 'mm', isNumeric: true },
];

/** Every slot in both units; with two scales on both outer strings, each from its own nut, and how far the bass end leans to the bridge. */
export function FretTable({ table, className }: { table: Slots; className?: string }) {
  return (
    <div className={className}>
      {table.doubt && <p className="pb-3 text-brass-deep">{table.doubt}</p>}
      <Table
        caption={`Fret slots, scale ${scaleWords(table, 'in')} (${scaleWords(table, 'mm')})`}
        columns={table.isMultiscale ? columnsOfTwo : columnsOfOne}
      >
        {table.rows.map((row) => (
          <Row key={row.fret}>
            <th scope="row" className="py-1.5 pr-3 font-semibold">
              {fretName(row.fret)}
            </th>
            {(table.isMultiscale ? figuresOfTwo(row) : figuresOfOne(row)).map((figure, i) => (
              <td key={i} className="px-3 py-1.5 text-right whitespace-nowrap last:pr-0">
                {figure}
              </td>
            ))}
          </Row>
        ))}
      </Table>
    </div>
  );
}

function figuresOfOne({ treble }: FretRow): string[] {
  return [slotWords(treble.fromNutMm, 'in'), slotWords(treble.fromNutMm, 'mm')];
}

function figuresOfTwo({ bass, treble, skewMm }: FretRow): string[] {
  return [bass.fromNutMm, treble.fromNutMm, skewMm].flatMap((mm) => [slotWords(mm, 'in'), slotWords(mm, 'mm')]);
}
