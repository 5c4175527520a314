import type { Metadata } from 'next';
import { hold, letLookOn, openToView, stopLookingOn } from './actions';
import { BuildPeople } from '@/components/people/build-people';
import { CompanionTools } from '@/components/people/companion-tools';
import { EventList } from '@/components/people/event-list';
import { HoldTools } from '@/components/people/hold-tools';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { listAccessEvents } from '@/db/queries/audit';
import { listClients, listStaff, requireBuild } from '@/db/queries/builds';
import { can, type Action } from '@/lib/access';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { holdRange } from '@/lib/validation/hold';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/people'>): Promise<Metadata> {
  return { title: `People on ${(await params).orderNumber}` };
}

export default async function BuildPeoplePage({ params }: PageProps<'/builds/[orderNumber]/people'>) {
  const viewer = await pageViewer();
  const build = await orNotFound(requireBuild(viewer, (await params).orderNumber));
  const { orderNumber } = build;
  const may = (action: Action) => can(viewer.role, build.standing, action);
  const [staff, clients, events] = await Promise.all([
    listStaff(viewer, build.id),
    listClients(viewer, orderNumber),
    may('access.read_events') ? listAccessEvents(viewer, orderNumber) : [],
  ]);
  const nowMs = requestMs();
  const heldUntilAt = build.heldUntilAt !== null && build.heldUntilAt > nowMs ? build.heldUntilAt : null;
  const when = { zone: viewer.timeZone, nowMs };
  const companions = clients.filter(({ standing }) => standing === 'companion');
  const tools = (
    <>
      {may('companion.manage') && (
        <CompanionTools
          orderNumber={orderNumber}
          companions={companions}
          heldUntilAt={heldUntilAt}
          letLookOn={letLookOn}
          stopLookingOn={stopLookingOn}
          {...when}
        />
      )}
      {may('build.hold') && (
        <HoldTools
          orderNumber={orderNumber}
          heldUntilAt={heldUntilAt}
          range={holdRange(viewer.timeZone, nowMs)}
          hold={hold}
          open={openToView}
          {...when}
        />
      )}
    </>
  );
  return (
    <PageFrame
      over={<span className="narrow">Order {orderNumber}</span>}
      title="Who is on this build"
      tools={may('companion.manage') || may('build.hold') ? tools : undefined}
    >
      <BuildPeople
        staff={staff}
        clients={may('companion.manage') ? clients.filter((person) => !companions.includes(person)) : clients}
        viewerId={viewer.id}
      />
      {events.length > 0 && (
        <PageSection title="Who was let in, and when">
          <EventList events={events} {...when} />
        </PageSection>
      )}
    </PageFrame>
  );
}
