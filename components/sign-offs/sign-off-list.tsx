import Link from 'next/link';
import { StateMark } from './state-mark';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { SignOffRow } from '@/db/queries/sign-offs';
import { dayWords } from '@/lib/date-words';
import { calendarDayWords } from '@/lib/sign-offs/state-words';

export type SignOffReader = { zone: string; nowMs: number; today: string };

export const signOffHref = ({ orderNumber, id }: { orderNumber: string; id: string }) =>
  `/builds/${orderNumber}/sign-offs/${id}`;

const kindWords = {
  spec: 'spec',
  drawing: 'drawing',
  sample: 'sample',
  change: 'change',
  concession: 'concession',
} as const;

type SignOffListProps = {
  caption: string;
  signOffs: SignOffRow[];
  reader: SignOffReader;
  /** Names the build in each row, for a list over several. */
  withBuild?: boolean;
};

/** Sign-offs, each with how it stands and what waits for it. */
export function SignOffList({ caption, signOffs, reader, withBuild = false }: SignOffListProps) {
  const columns = [
    { key: 'title', label: 'To be signed' },
    ...(withBuild ? [{ key: 'build', label: 'Build' }] : []),
    { key: 'due', label: 'By' },
    { key: 'state', label: 'How it stands' },
  ];
  return (
    <Table caption={caption} columns={columns}>
      {signOffs.map((signOff) => (
        <Row key={signOff.id}>
          <RowHead note={`${kindWords[signOff.kind]}, sent ${dayWords(signOff.askedAt, reader.zone, reader.nowMs)}`}>
            <Link href={signOffHref(signOff)} className="-my-2.5 inline-block py-2.5 text-finish-deep hover:underline">
              <bdi className="break-words">{signOff.title}</bdi>
            </Link>
          </RowHead>
          {withBuild && (
            <Cell note={signOff.ownerName && <bdi>{signOff.ownerName}</bdi>}>
              <span className="narrow font-semibold">{signOff.orderNumber}</span> <bdi>{signOff.instrument}</bdi>
            </Cell>
          )}
          <Cell className="whitespace-nowrap" note={isOpen(signOff) && signOff.blocks && `${signOff.blocks} waits`}>
            {calendarDayWords(signOff.dueOn, reader.nowMs)}
          </Cell>
          <Cell note={answered(signOff, reader)}>
            <StateMark signOff={signOff} today={reader.today} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

const isOpen = ({ state }: SignOffRow) => state === 'asked' || state === 'change_asked';

function answered({ state, answeredAt }: SignOffRow, { zone, nowMs }: SignOffReader) {
  const isAnswered = state === 'signed' || state === 'change_asked';
  return isAnswered && answeredAt !== null ? dayWords(answeredAt, zone, nowMs) : null;
}
