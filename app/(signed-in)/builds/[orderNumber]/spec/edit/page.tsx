import type { Metadata } from 'next';
import { save, send } from './actions';
import { SendVersion } from '@/components/specs/edit/send-version';
import { SpecForm } from '@/components/specs/edit/spec-form';
import { EditSurroundings } from '@/components/specs/edit/surroundings';
import { SpecFrame } from '@/components/specs/spec-frame';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { SectionHeading } from '@/components/ui/section-heading';
import { shopDay } from '@/db/queries/calendar';
import { listDrawings } from '@/db/queries/documents';
import { listMaterials } from '@/db/queries/materials';
import { findDraft } from '@/db/queries/spec-drafts';
import { requireFreezeGround } from '@/db/queries/spec-freeze';
import { listVersions } from '@/db/queries/spec-versions';
import { can } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { dayWords, clockWords } from '@/lib/date-words';
import { requestMs } from '@/lib/request';
import { dueRange } from '@/lib/sign-offs/due-day';
import { canChange } from '@/lib/specs/can-change';
import { nameDrawings } from '@/lib/specs/drawings';
import { keepFrozen } from '@/lib/specs/freeze';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/spec/edit'>): Promise<Metadata> {
  return { title: `Edit the spec of ${(await params).orderNumber}` };
}

/** The draft, for staff. A rep sends it from here. */
export default async function EditSpecPage({ params }: PageProps<'/builds/[orderNumber]/spec/edit'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const draft = await orNotFound(findDraft(viewer, orderNumber));
  const over = `Order ${orderNumber}`;
  if (!draft)
    return (
      <SpecFrame orderNumber={orderNumber} over={over} title="Edit the spec">
        <EmptyState
          title="There is no draft yet"
          action={<LinkButton href={`/builds/${orderNumber}/spec`}>Start one from a template</LinkButton>}
        />
      </SpecFrame>
    );
  const nowMs = requestMs();
  const [ground, versions, materials, drawings, today] = await Promise.all([
    requireFreezeGround(viewer, orderNumber),
    listVersions(viewer, orderNumber),
    listMaterials(viewer, orderNumber),
    listDrawings(viewer, orderNumber),
    shopDay(nowMs),
  ]);
  const clock = { ...ground, zone: viewer.timeZone, nowMs };
  const agreed = ground.agreed;
  const saved = {
    document: keepFrozen({ ...ground, next: draft.document }, nowMs),
    revision: draft.revision,
    editedBy: draft.editedBy,
  };
  const changeOf = agreed?.items.map((item) => [item.key, canChange(item, clock, build.deliveredAt !== null)]) ?? [];
  const asOption = ({ key, name }: { key: string; name: string }) => ({ value: key, label: name });
  return (
    <SpecFrame
      orderNumber={orderNumber}
      over={over}
      title="Edit the spec"
      intro={`Saved last by ${draft.editedBy}, ${dayWords(draft.editedAt, viewer.timeZone, nowMs)} at ${clockWords(draft.editedAt, viewer.timeZone)}. The owner sees only what is sent.`}
    >
      <EditSurroundings
        stages={ground.stages.map(asOption)}
        materials={materials.map(asOption)}
        drawings={nameDrawings(drawings, viewer.timeZone)}
      >
        <SpecForm orderNumber={orderNumber} saved={saved} canChange={Object.fromEntries(changeOf)} save={save} />
      </EditSurroundings>
      {can(viewer.role, build.standing, 'spec.send') && (
        <section aria-labelledby="send" className="grid gap-5">
          <SectionHeading id="send" note="What is saved goes out; save first.">
            Send it to be signed
          </SectionHeading>
          <SendVersion
            send={send}
            orderNumber={orderNumber}
            revision={draft.revision}
            nextNumber={(versions[0]?.number ?? 0) + 1}
            stagesAhead={ground.stages.filter(({ startedAt }) => startedAt === null).map(asOption)}
            dueRange={dueRange(today)}
          />
        </section>
      )}
    </SpecFrame>
  );
}
