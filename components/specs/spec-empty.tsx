import { StartSpec } from './start-spec';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import type { FormAction } from '@/lib/action';

type SpecEmptyProps = {
  orderNumber: string;
  /** Null for the client side, which starts none. */
  templates: { id: string; name: string }[] | null;
  hasDraft: boolean;
  start: FormAction;
};

/** Nothing was sent yet: what happens next, and for staff how to begin. */
export function SpecEmpty({ orderNumber, templates, hasDraft, start }: SpecEmptyProps) {
  return (
    <div className="mx-auto max-w-[82rem] px-4.5 py-8 md:px-10 md:py-10">
      <p className="narrow text-sm font-semibold text-soft">Order {orderNumber}</p>
      <h1 className="mt-1 mb-8 text-3xl">Spec</h1>
      {templates === null ? (
        <EmptyState
          title="Your spec is being written"
          action={
            <LinkButton href={`/builds/${orderNumber}/questions/new`}>Tell the shop what you have in mind</LinkButton>
          }
        >
          When it is complete your rep sends it here: every measure, wood and part of your guitar, to read in peace and
          sign. Nothing is cut before.
        </EmptyState>
      ) : hasDraft ? (
        <EmptyState
          title="A draft is begun, nothing was sent"
          action={<LinkButton href={`/builds/${orderNumber}/spec/edit`}>Go on with the draft</LinkButton>}
        >
          The owner sees nothing of it until a rep sends the first version to be signed.
        </EmptyState>
      ) : (
        <EmptyState
          title="No spec yet"
          action={<StartSpec orderNumber={orderNumber} templates={templates} start={start} />}
        >
          Start from a template. Its values are common practice, there to be changed; the scale is taken from the order.
        </EmptyState>
      )}
    </div>
  );
}
