import Link from 'next/link';
import { PersonStateWord } from './person-state';
import { workWords } from '@/components/people/person-words';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
import type { PersonRow } from '@/db/queries/people';

const wide = 'hidden sm:table-cell';

const columns = [
  { key: 'person', label: 'Person' },
  { key: 'role', label: 'Role' },
  { key: 'builds', label: 'Builds', isNumeric: true, className: wide },
  { key: 'sessions', label: 'Browsers', isNumeric: true, className: wide },
  { key: 'state', label: 'Account' },
];

/** Everybody, one a row; the name leads to what they may see. */
export function PeopleTable({ people }: { people: PersonRow[] }) {
  return (
    <Table caption="People" columns={columns}>
      {people.map((person) => (
        <Row key={person.id}>
          <RowHead note={<span className="break-all">{person.email}</span>}>
            <Link prefetch={false} href={`/access/people/${person.id}`} className="text-finish-deep hover:underline">
              <bdi>{person.name}</bdi>
            </Link>
          </RowHead>
          <Cell>{workWords(person)}</Cell>
          <Cell isNumeric className={wide}>
            {person.buildCount}
          </Cell>
          <Cell isNumeric className={wide}>
            {person.sessionCount}
          </Cell>
          <Cell>
            <PersonStateWord {...person} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}
