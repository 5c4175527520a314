import type { Metadata } from 'next';
import { estimate, setCapacity } from './actions';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { CapacityForm } from '@/components/schedule/capacity-form';
import { StageForm } from '@/components/schedule/stage-form';
import { requireStageSettings } from '@/db/queries/shop-calendar';
import { orNotFound, pageViewer } from '@/lib/auth/page';

export const metadata: Metadata = { title: 'Stages' };

export default async function StagesPage() {
  const viewer = await pageViewer();
  const { stages, departments } = await orNotFound(requireStageSettings(viewer));
  const routes = [...new Map(stages.map(({ routeId, routeName }) => [routeId, routeName]))];
  return (
    <PageFrame
      title="Stages"
      intro="Estimates are in working days and count while fewer than eight builds have been through a stage. The shortest wait (wood that rests, finish that cures) and the longest silence towards the owner are in calendar days."
      tools={
        <PageSection title="Builds a department can take in a week">
          {departments.map((department) => (
            <CapacityForm key={department.key} save={setCapacity} department={department} />
          ))}
        </PageSection>
      }
    >
      {routes.map(([routeId, name]) => (
        <PageSection key={routeId} title={name}>
          {stages
            .filter((stage) => stage.routeId === routeId)
            .map((stage) => (
              <StageForm key={stage.key} save={estimate} stage={stage} />
            ))}
        </PageSection>
      ))}
    </PageFrame>
  );
}
