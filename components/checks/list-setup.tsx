import { LineForm, NewListForm } from './list-forms';
import { ButtonForm } from '@/components/people/button-form';
import { ConfirmForm } from '@/components/people/confirm-form';
import { PageSection } from '@/components/people/page-frame';
import type { RouteLists } from '@/db/queries/check-lists';
import type { FormAction } from '@/lib/action';

type Actions = Record<'addList' | 'removeList' | 'addLine' | 'changeLine' | 'removeLine', FormAction>;

/** The inspection lists of one route, each line with its tools. */
export function RouteSetup({ route, actions }: { route: RouteLists; actions: Actions }) {
  const stages = route.stages.map(({ key, name }) => ({ value: key, label: name }));
  return (
    <PageSection title={route.name}>
      {route.lists.map((list) => (
        <ListSetup key={list.id} list={list} actions={actions} />
      ))}
      <NewListForm add={actions.addList} routeId={route.id} stages={stages} />
    </PageSection>
  );
}

function ListSetup({ list, actions }: { list: RouteLists['lists'][number]; actions: Actions }) {
  return (
    <div className="grid gap-3 border-t border-line pt-4">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h3 className="text-lg">
          {list.name} <span className="text-sm font-normal text-soft">in {list.stageName}</span>
        </h3>
        <ConfirmForm
          send={actions.removeList}
          values={{ listId: list.id }}
          label="Remove the list"
          name={`Remove the list ${list.name}`}
          title={`Remove “${list.name}”?`}
          description="Builds no longer go through it. Inspections that were made by it stay readable."
        />
      </div>
      {list.lines.length === 0 && <p className="text-soft">No lines yet, so no build waits for it.</p>}
      <ol className="grid gap-2">
        {list.lines.map((line, index) => (
          <LineSetup key={line.id} line={line} number={index + 1} actions={actions} />
        ))}
      </ol>
      <LineForm save={actions.addLine} values={{ listId: list.id }} label="Another line" button="Add the line" />
    </div>
  );
}

type LineSetupProps = { line: RouteLists['lists'][number]['lines'][number]; number: number; actions: Actions };

function LineSetup({ line, number, actions }: LineSetupProps) {
  return (
    <li>
      <details>
        <summary className="flex min-h-11 cursor-pointer items-center gap-2">
          <span className="narrow text-soft">{number}</span>
          <span>
            {line.text}
            {line.photoNeeded && <span className="text-soft"> (photo)</span>}
          </span>
        </summary>
        <div className="grid gap-3 py-3 pl-6">
          <LineForm
            save={actions.changeLine}
            values={{ lineId: line.id }}
            label="What is looked at"
            button="Save the line"
            line={line}
          />
          <ButtonForm
            send={actions.removeLine}
            values={{ lineId: line.id }}
            name={`Remove line ${number}: ${line.text}`}
          >
            Remove it
          </ButtonForm>
        </div>
      </details>
    </li>
  );
}
