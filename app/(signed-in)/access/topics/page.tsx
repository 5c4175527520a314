import type { Metadata } from 'next';
import { keepTopic, nameFallback, nameLead } from './actions';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { NamedPersonForm } from '@/components/topics/named-person-form';
import { StuckQuestions } from '@/components/topics/stuck-questions';
import { TopicForm } from '@/components/topics/topic-form';
import { findTopicSetUp } from '@/db/queries/topics';
import { orNotFound, pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';

export const metadata: Metadata = { title: 'Topics' };

export default async function TopicsPage() {
  const viewer = await pageViewer();
  const { topics, departments, staff, fallbackId, stuck } = await orNotFound(findTopicSetUp(viewer));
  return (
    <PageFrame
      title="Topics"
      intro="What can be asked about, who answers, and within how many working hours."
      tools={
        <>
          <PageSection title="Who leads a department">
            <p className="text-soft">A lead answers where no builder of the department is on the build, if they are.</p>
            {departments.map(({ key, name, leadId }) => (
              <NamedPersonForm
                key={key}
                save={nameLead}
                label={name}
                field="leadId"
                values={{ departmentKey: key }}
                chosenId={leadId}
                staff={staff.filter(({ role }) => role === 'builder')}
              />
            ))}
          </PageSection>
          <PageSection title="When nobody else can">
            <NamedPersonForm
              save={nameFallback}
              label="Questions then go to"
              field="userId"
              chosenId={fallbackId}
              staff={staff}
              hint="They must be on the build to read it; an admin steps in first. Builders get no money or artist matters."
            />
          </PageSection>
        </>
      }
    >
      <StuckQuestions stuck={stuck} zone={viewer.timeZone} nowMs={requestMs()} />
      <PageSection title="Topics, as owners choose them">
        <div className="grid gap-6">
          {topics.map((topic) => (
            <TopicForm key={topic.id} save={keepTopic} topic={topic} departments={departments} />
          ))}
        </div>
      </PageSection>
      <PageSection title="A new topic">
        <TopicForm save={keepTopic} departments={departments} />
      </PageSection>
    </PageFrame>
  );
}
