'use client';

import { startTransition, useActionState, useCallback, useReducer, useRef, useState, type FormEvent } from 'react';
import { AddItem } from './add-item';
import { ComputedBoard, ComputedFigures } from './computed-panel';
import { edit, startOf, type Saved } from './edit-state';
import { GroupFields } from './group-fields';
import { Meanwhile } from './meanwhile';
import { useSurroundings } from './surroundings';
import { useAskBeforeLeaving } from './use-ask-before-leaving';
import { useSaid } from './use-said';
import { FormOutcome } from '@/components/people/form-outcome';
import { Button } from '@/components/ui/button';
import type { FormAction } from '@/lib/action';
import { fresh } from '@/lib/form-state';
import { computedFrom } from '@/lib/specs/board';
import type { CanChange } from '@/lib/specs/can-change';
import { checkDocument } from '@/lib/specs/check';
import type { SpecItem } from '@/lib/specs/document';
import { byGroup } from '@/lib/specs/groups';

export type SpecFormProps = {
  orderNumber: string;
  saved: Saved;
  canChange: Readonly<Record<string, CanChange>>;
  save: FormAction;
};

/** The whole spec as a form: each row keeps to itself, what is computed from it stands beside it. */
export function SpecForm({ orderNumber, saved, canChange, save }: SpecFormProps) {
  const [state, dispatch] = useReducer(edit, saved, startOf);
  const [answer, submit, isSaving] = useActionState(save, fresh);
  const [asked, setAsked] = useState<typeof state.document | null>(null);
  const [trouble, setTrouble] = useState('');
  const form = useRef<HTMLFormElement>(null);
  const surroundings = useSurroundings();
  if (saved.revision > state.saved.revision) dispatch({ kind: 'saved elsewhere or here', saved });
  const { document, meanwhile } = state;
  const from = computedFrom(document);
  useAskBeforeLeaving(document !== state.clean);
  const saidOf = useSaid(document, answer, asked);
  const say = useCallback((item: SpecItem) => dispatch({ kind: 'say', item }), []);
  const takeOut = useCallback((...keys: string[]) => dispatch({ kind: 'take out', keys }), []);
  const add = useCallback((items: SpecItem[], behindKey?: string) => dispatch({ kind: 'add', items, behindKey }), []);

  function send(event: FormEvent) {
    event.preventDefault();
    const wrong = Object.keys(checkDocument(document, surroundings)).length;
    setTrouble(wrong === 0 ? '' : `${wrong === 1 ? 'One field needs' : `${wrong} fields need`} another look first.`);
    if (wrong > 0) return form.current?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
    const data = new FormData();
    data.set('orderNumber', orderNumber);
    data.set('revision', String(state.saved.revision));
    data.set('document', JSON.stringify(document));
    dispatch({ kind: 'send' });
    setAsked(document);
    startTransition(() => submit(data));
  }

  return (
    <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-x-12 gap-y-8 xl:grid-cols-[minmax(0,1fr)_27rem]">
      <div className="min-w-0 border-b border-line bg-film pb-3 contain-content lg:sticky lg:top-0 lg:z-10 xl:col-span-2">
        <ComputedBoard document={document} from={from} />
      </div>
      <form ref={form} onSubmit={send} noValidate className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-8">
        {meanwhile && (
          <Meanwhile
            meanwhile={meanwhile}
            document={document}
            takeTheirs={(key) => dispatch({ kind: 'take theirs', key })}
            seen={() => dispatch({ kind: 'seen' })}
          />
        )}
        {byGroup(document.items).map(({ group, items }) => (
          <GroupFields
            key={group}
            group={group}
            items={items}
            canChange={canChange}
            saidOf={saidOf}
            say={say}
            takeOut={takeOut}
            add={add}
          />
        ))}
        <AddItem takenKeys={() => new Set(document.items.map(({ key }) => key))} add={(item) => add([item])} />
        <div className="sticky bottom-0 grid gap-3 border-t-2 border-ink bg-film py-3">
          {trouble && <p className="font-semibold text-late">{trouble}</p>}
          {!trouble && !isSaving && <FormOutcome state={answer} shown={shownIn(answer)} />}
          <div>
            <Button type="submit" disabled={isSaving} className="min-h-12">
              {isSaving ? 'Saving' : 'Save the draft'}
            </Button>
          </div>
        </div>
      </form>
      <div className="min-w-0">
        <ComputedFigures document={document} from={from} />
      </div>
    </div>
  );
}

/** Sentences about items stand at the items. */
function shownIn(answer: ReturnType<typeof useActionState<typeof fresh, FormData>>[0]): string[] {
  return answer.state === 'refused' ? Object.keys(answer.fields).filter((field) => field.startsWith('items.')) : [];
}
