import type { Metadata } from 'next';
import Link from 'next/link';
import { FretSheet } from '@/components/specs/fret-sheet';
import { PrintButton } from '@/components/specs/print-button';
import { SpecFrame } from '@/components/specs/spec-frame';
import { EmptyState } from '@/components/ui/empty-state';
import { findShownSpec } from '@/db/queries/spec-shown';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { fingerboard } from '@/lib/craft/fingerboard';
import { fretSheet, type Paper } from '@/lib/craft/fret-sheet';
import { boardOf } from '@/lib/specs/board';
import { shownName } from '@/lib/specs/shown-name';

export async function generateMetadata({
  params,
}: PageProps<'/builds/[orderNumber]/spec/frets/sheet'>): Promise<Metadata> {
  return { title: `Fret sheet of ${(await params).orderNumber}` };
}

const papers: Paper[] = ['A4', 'Letter'];

/** The board at 1:1, to be printed without scaling. */
export default async function SheetPage({ params, searchParams }: PageProps<'/builds/[orderNumber]/spec/frets/sheet'>) {
  const { orderNumber } = await params;
  const { viewer } = await openBuild(orderNumber);
  const shown = await orNotFound(findShownSpec(viewer, orderNumber));
  const asked = (await searchParams).paper;
  const paper = papers.find((one) => one === asked) ?? 'A4';
  const plan = shown && boardOf(shown.document);
  const drawn = plan?.ok ? fingerboard(plan.value) : plan;
  const sheet = drawn?.ok ? fretSheet(drawn.board, paper) : drawn;
  const over = `Order ${orderNumber}${shown ? ` · ${shownName(shown)}` : ''}`;
  if (!shown || !drawn?.ok || !sheet?.ok)
    return (
      <SpecFrame orderNumber={orderNumber} over={over} title="Fret sheet">
        <EmptyState title="There is no sheet to print yet">
          {sheet && !sheet.ok ? sheet.message : 'It is drawn from the spec as soon as it is sent.'}
        </EmptyState>
      </SpecFrame>
    );
  return (
    <SpecFrame
      orderNumber={orderNumber}
      over={over}
      title="Fret sheet"
      intro="Print it at 100 %, without fitting it to the page, and lay a rule against the check rulers first."
      action={
        <div className="flex flex-wrap items-center gap-5">
          {papers.map((one) => (
            <Link
              key={one}
              href={`?paper=${one}`}
              aria-current={one === paper ? 'true' : undefined}
              className="inline-flex min-h-11 items-center font-semibold text-finish-deep aria-[current]:text-ink aria-[current]:underline"
            >
              {one}
            </Link>
          ))}
          <PrintButton />
        </div>
      }
    >
      <FretSheet sheet={sheet.sheet} board={drawn.board} title={`${orderNumber}, spec ${shownName(shown)}`} />
    </SpecFrame>
  );
}
