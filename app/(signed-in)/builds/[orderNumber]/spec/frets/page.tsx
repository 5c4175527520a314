import type { Metadata } from 'next';
import { FretTable } from '@/components/specs/fret-table';
import { SpecBoard } from '@/components/specs/spec-board';
import { SpecFrame } from '@/components/specs/spec-frame';
import { UnitFrame, UnitSwitch } from '@/components/specs/unit-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { cookies } from 'next/headers';
import { findShownSpec } from '@/db/queries/spec-shown';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { fretTable } from '@/lib/craft/fret-table';
import { ruleOf18Words, slotErrorWords } from '@/lib/craft/fret-words';
import { scalePlanOf } from '@/lib/specs/board';
import { shownName } from '@/lib/specs/shown-name';
import { shownUnitFrom, UNIT_COOKIE } from '@/lib/specs/shown-unit';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/spec/frets'>): Promise<Metadata> {
  return { title: `Frets of ${(await params).orderNumber}` };
}

/** Every slot in both units, and the way to the sheet. */
export default async function FretsPage({ params }: PageProps<'/builds/[orderNumber]/spec/frets'>) {
  const { orderNumber } = await params;
  const { viewer } = await openBuild(orderNumber);
  const shown = await orNotFound(findShownSpec(viewer, orderNumber));
  const plan = shown && scalePlanOf(shown.document);
  const table = plan?.ok ? fretTable(plan.value) : plan;
  if (!shown || !table?.ok)
    return (
      <SpecFrame orderNumber={orderNumber} over={`Order ${orderNumber}`} title="Frets">
        <EmptyState title="There are no frets to show yet">
          {table && !table.ok ? table.message : 'They are computed from the spec as soon as it is sent.'}
        </EmptyState>
      </SpecFrame>
    );
  const unit = shownUnitFrom((await cookies()).get(UNIT_COOKIE)?.value);
  return (
    <UnitFrame initial={unit}>
      <SpecFrame
        orderNumber={orderNumber}
        over={`Order ${orderNumber} · ${shownName(shown)}`}
        title="Frets"
        intro="Twelve-tone equal temperament. Cut from the table; lay the sheet beside it as a check."
        action={
          <div className="flex flex-wrap items-center gap-4">
            <UnitSwitch className="w-52" />
            <LinkButton href={`/builds/${orderNumber}/spec/frets/sheet`}>Print at full size</LinkButton>
          </div>
        }
      >
        <SpecBoard document={shown.document} />
        <FretTable table={table.table} className="max-w-3xl" />
        <p className="max-w-[62ch] text-soft">
          {slotErrorWords(table.table)} {ruleOf18Words(table.table)}
        </p>
      </SpecFrame>
    </UnitFrame>
  );
}
