import { clsx } from 'clsx';
import type { ReactNode } from 'react';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import { concededWords, WITHOUT_PROOF, type ProofLine, type ProofState } from '@/lib/specs/proof';

const columns = (last: string) => [
  { key: 'item', label: 'Item' },
  { key: 'signed', label: 'As signed' },
  { key: 'built', label: 'As built' },
  { key: 'next', label: last },
];

const words: Record<ProofState, string> = {
  proven: 'proven',
  out_of_tolerance: 'out of tolerance',
  conceded: 'let pass by the owner',
  open: WITHOUT_PROOF,
};

type CheckLinesProps = {
  caption: string;
  lastColumn: string;
  lines: ProofLine[];
  nextOf: (line: ProofLine) => ReactNode;
};

/** Signed items with how they stand and what mends them. */
export function CheckLines({ caption, lastColumn, lines, nextOf }: CheckLinesProps) {
  return (
    <Table caption={caption} columns={columns(lastColumn)} isStacked>
      {lines.map((line) => (
        <Row key={line.item.key} id={`item-${line.item.key}`}>
          <RowHead className="min-w-36">
            <bdi>{line.item.label}</bdi>
          </RowHead>
          <Cell title="As signed" className="min-w-28">
            <bdi>{concededWords(line).signed}</bdi>
          </Cell>
          <Cell title="As built" note={line.withinWords} className="min-w-36">
            {line.measured !== null && <bdi className="font-semibold">{line.measured}, </bdi>}
            <span className={clsx(line.state === 'out_of_tolerance' && 'font-semibold text-late')}>
              {words[line.state]}
            </span>
          </Cell>
          <Cell title={lastColumn} className="min-w-52 max-md:col-span-2">
            {nextOf(line)}
          </Cell>
        </Row>
      ))}
    </Table>
  );
}
