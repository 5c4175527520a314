import { SpecRow } from './spec-row';
import type { SpecLine } from './spec-line';
import { Cautions } from '@/components/craft/cautions';
import { caution, cautionsForGroup } from '@/lib/craft/cautions';
import type { SpecGroup } from '@/lib/specs/document';
import { byGroup, groupName } from '@/lib/specs/groups';

type SpecTableProps = {
  lines: SpecLine[];
  /** "As signed", or "As sent" while nobody has signed it. */
  signedTitle: string;
  orderNumber: string;
  /** Null where nobody here may ask. */
  askHref: string | null;
};

/** Every item by its group: what was agreed, what was measured, and where that can be seen. */
export function SpecTable(props: SpecTableProps) {
  const groups = byGroup(props.lines);
  return (
    <>
      <nav aria-label="Groups" className="mb-6">
        <ul role="list" className="flex flex-wrap gap-x-5">
          {groups.map(({ group }) => (
            <li key={group}>
              <a
                href={`#group-${group}`}
                className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
              >
                {groupName(group)}
              </a>
            </li>
          ))}
        </ul>
      </nav>
      {props.askHref && (
        <p className="mb-6 max-w-[62ch] text-soft">
          What is frozen says since when. Press that to ask for a change; asking binds nobody.
        </p>
      )}
      {groups.map(({ group, items }) => (
        <section key={group} aria-labelledby={`group-${group}`} className="mb-10">
          <h3 id={`group-${group}`} className="mb-3 scroll-mt-4 text-lg">
            {groupName(group)}
          </h3>
          <GroupTable {...props} lines={items} name={groupName(group)} />
          <Cautions cautions={cautionsOf(group, items)} className="mt-4" />
        </section>
      ))}
    </>
  );
}

/** Papers are said where a material of the group is marked, not beside every piece of wood. */
function cautionsOf(group: SpecGroup, lines: SpecLine[]) {
  const others = cautionsForGroup(group).filter(({ key }) => key !== 'papers');
  return lines.some(({ needsPapers }) => needsPapers) ? [caution('papers'), ...others] : others;
}

const headClass = 'px-3 py-2 text-sm font-semibold text-soft first:pl-0';

/** Rows on a wide screen, cards on a phone; the roles keep it a table to a screen reader either way. */
function GroupTable({ lines, name, signedTitle, orderNumber, askHref }: SpecTableProps & { name: string }) {
  return (
    <table role="table" aria-label={name} className="block w-full border-collapse text-left md:table md:table-fixed">
      <thead role="rowgroup" className="sr-only md:not-sr-only md:table-header-group">
        <tr role="row" className="border-b-2 border-ink">
          <th role="columnheader" scope="col" className={headClass}>
            Item
          </th>
          <th role="columnheader" scope="col" className={headClass}>
            {signedTitle}
          </th>
          <th role="columnheader" scope="col" className={headClass}>
            As built
          </th>
          <th role="columnheader" scope="col" className={headClass}>
            Proof
          </th>
        </tr>
      </thead>
      <tbody role="rowgroup" className="block border-t-2 border-ink md:table-row-group md:border-t-0">
        {lines.map((line) => (
          <SpecRow key={line.key} line={line} signedTitle={signedTitle} orderNumber={orderNumber} askHref={askHref} />
        ))}
      </tbody>
    </table>
  );
}
