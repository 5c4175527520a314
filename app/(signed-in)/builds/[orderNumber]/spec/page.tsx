import type { Metadata } from 'next';
import { cookies } from 'next/headers';
import { start } from './actions';
import { SpecBoard } from '@/components/specs/spec-board';
import { SpecEmpty } from '@/components/specs/spec-empty';
import { SpecHeader } from '@/components/specs/spec-header';
import { specCounts, specOver } from '@/components/specs/spec-head-words';
import { SpecLinks } from '@/components/specs/spec-links';
import { SpecNotices } from '@/components/specs/spec-notices';
import { specLine, unproven } from '@/components/specs/spec-line';
import { SpecStrings } from '@/components/specs/spec-strings';
import { SpecTable } from '@/components/specs/spec-table';
import { UnitFrame } from '@/components/specs/unit-frame';
import { SectionHeading } from '@/components/ui/section-heading';
import { listChangeRequests } from '@/db/queries/change-requests';
import { listDrawings } from '@/db/queries/documents';
import { listMaterials } from '@/db/queries/materials';
import { listProofLines } from '@/db/queries/proofs';
import { findDraft, listTemplates } from '@/db/queries/spec-drafts';
import { requireFreezeGround } from '@/db/queries/spec-freeze';
import { findShownSpec } from '@/db/queries/spec-shown';
import { listVersions } from '@/db/queries/spec-versions';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { nameDrawings } from '@/lib/specs/drawings';
import { shownUnitFrom, UNIT_COOKIE } from '@/lib/specs/shown-unit';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/spec'>): Promise<Metadata> {
  return { title: `Spec of ${(await params).orderNumber}` };
}

export default async function SpecPage({ params }: PageProps<'/builds/[orderNumber]/spec'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const shown = await orNotFound(findShownSpec(viewer, orderNumber));
  const may = (action: Parameters<typeof can>[2]) => can(viewer.role, build.standing, action);
  if (!shown || shown.state === 'draft') {
    const templates = may('spec.edit') ? await listTemplates(viewer, orderNumber) : null;
    return <SpecEmpty orderNumber={orderNumber} templates={templates} hasDraft={shown !== null} start={start} />;
  }
  const [sheet, versions, ground, materials, drawings, changes, draft, jar] = await Promise.all([
    listProofLines(viewer, orderNumber),
    listVersions(viewer, orderNumber),
    requireFreezeGround(viewer, orderNumber),
    listMaterials(viewer, orderNumber),
    listDrawings(viewer, orderNumber),
    listChangeRequests(viewer, orderNumber),
    may('spec.edit') ? findDraft(viewer, orderNumber) : null,
    cookies(),
  ]);
  const nowMs = requestMs();
  const around = {
    ...ground,
    orderNumber,
    zone: viewer.timeZone,
    nowMs,
    isDelivered: build.deliveredAt !== null,
    materials: Object.fromEntries(materials.map(({ key, name }) => [key, name])),
    drawings: nameDrawings(drawings, viewer.timeZone),
    papersKeys: new Set(materials.filter((one) => one.papersMayBeNeeded).map(({ key }) => key)),
  };
  const judged = shown.state === 'signed' ? sheet.lines : shown.document.items.map(unproven);
  const lines = judged.map((line) => specLine(line, around));
  const isSigned = shown.state === 'signed';
  return (
    <UnitFrame initial={shownUnitFrom(jar.get(UNIT_COOKIE)?.value)}>
      <SpecHeader
        over={specOver(orderNumber, versions, shown.number, viewer.timeZone, nowMs)}
        title={isSigned ? 'As signed, as built' : 'As sent to be signed'}
        counts={specCounts(lines, isSigned)}
        actions={<SpecLinks orderNumber={orderNumber} mayEdit={may('spec.edit')} isSigned={isSigned} />}
      >
        <SpecBoard document={shown.document} />
      </SpecHeader>
      <div className="mx-auto grid max-w-[82rem] gap-x-14 gap-y-10 px-4.5 py-8 md:px-10 lg:grid-cols-[minmax(0,1fr)_23rem]">
        <div className="min-w-0">
          <SpecNotices
            orderNumber={orderNumber}
            versions={versions}
            shownNumber={shown.number}
            changes={changes}
            isOwner={build.standing === 'owner'}
            draft={draft}
            sentDocument={ground.agreed}
            zone={viewer.timeZone}
            nowMs={nowMs}
          />
          <SectionHeading className="mb-6">
            {isSigned ? 'What was signed, and what was measured' : 'What is to be signed'}
          </SectionHeading>
          <SpecTable
            lines={lines}
            signedTitle={isSigned ? 'As signed' : 'As sent'}
            orderNumber={orderNumber}
            askHref={may('change.ask') && build.deliveredAt === null ? `/builds/${orderNumber}/spec/changes` : null}
          />
        </div>
        <aside className="min-w-0">
          <SectionHeading className="mb-4">Balance across the strings</SectionHeading>
          <SpecStrings document={shown.document} />
          {may('question.ask') && (
            <a
              href={`/builds/${orderNumber}/questions/new`}
              className="mt-2 inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
            >
              Ask about this
            </a>
          )}
        </aside>
      </div>
    </UnitFrame>
  );
}
