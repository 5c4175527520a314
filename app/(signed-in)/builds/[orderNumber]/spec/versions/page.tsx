import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { CompareForm } from '@/components/specs/compare-form';
import { SpecFrame } from '@/components/specs/spec-frame';
import { SpecChanges } from '@/components/specs/spec-changes';
import { VersionList } from '@/components/specs/version-list';
import { EmptyState } from '@/components/ui/empty-state';
import { SectionHeading } from '@/components/ui/section-heading';
import { listStages } from '@/db/queries/builds';
import { listDrawings } from '@/db/queries/documents';
import { listMaterials } from '@/db/queries/materials';
import { findDraft } from '@/db/queries/spec-drafts';
import { listVersions, requireComparison } from '@/db/queries/spec-versions';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { chosenSides, sideName } from '@/lib/specs/compare';
import { diffSpecs } from '@/lib/specs/diff';
import { nameDrawings } from '@/lib/specs/drawings';
import { shownUnitFrom, UNIT_COOKIE } from '@/lib/specs/shown-unit';

export async function generateMetadata({
  params,
}: PageProps<'/builds/[orderNumber]/spec/versions'>): Promise<Metadata> {
  return { title: `Spec versions of ${(await params).orderNumber}` };
}

/** Every version that was sent, and what any two of them say differently. Only staff compare with the draft. */
export default async function VersionsPage({ params, searchParams }: PageProps<'/builds/[orderNumber]/spec/versions'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const versions = await orNotFound(listVersions(viewer, orderNumber));
  const mayEdit = can(viewer.role, build.standing, 'spec.edit');
  const draft = mayEdit ? await findDraft(viewer, orderNumber) : null;
  const numbers = versions.map(({ number }) => number);
  const sides = chosenSides(await searchParams, numbers, draft !== null);
  return (
    <SpecFrame
      orderNumber={orderNumber}
      over={`Order ${orderNumber}`}
      title="Versions of the spec"
      intro="A version that was sent never changes. What is agreed next goes into the next one."
    >
      {versions.length === 0 ? (
        <EmptyState title="No version was sent yet">
          The first one appears here when a rep sends it to be signed.
        </EmptyState>
      ) : (
        <VersionList
          versions={versions}
          isClient={!mayEdit}
          orderNumber={orderNumber}
          zone={viewer.timeZone}
          nowMs={requestMs()}
        />
      )}
      {sides && (
        <section aria-labelledby="compare" className="grid gap-5">
          <SectionHeading id="compare">What changed</SectionHeading>
          <CompareForm numbers={numbers} hasDraft={draft !== null} from={sides.from} to={sides.to} />
          <SpecChanges changes={await changesBetween(sides)} from={sideName(sides.from)} to={sideName(sides.to)} />
        </section>
      )}
    </SpecFrame>
  );

  async function changesBetween({ from, to }: NonNullable<typeof sides>) {
    const [{ before, after }, materials, drawings, stages, jar] = await Promise.all([
      orNotFound(requireComparison(viewer, orderNumber, from, to)),
      listMaterials(viewer, orderNumber),
      listDrawings(viewer, orderNumber),
      listStages(viewer, build.id),
      cookies(),
    ]);
    return diffSpecs(before, after, {
      show: shownUnitFrom(jar.get(UNIT_COOKIE)?.value),
      materials: Object.fromEntries(materials.map(({ key, name }) => [key, name])),
      drawings: nameDrawings(drawings, viewer.timeZone),
      stageNames: Object.fromEntries(stages.map(({ key, name }) => [key, name])),
    });
  }
}
