import type { Metadata } from 'next';
import { addLine, addList, changeLine, removeLine, removeList } from './actions';
import { RouteSetup } from '@/components/checks/list-setup';
import { PageFrame } from '@/components/people/page-frame';
import { listCheckLists } from '@/db/queries/check-lists';
import { orNotFound, pageViewer } from '@/lib/auth/page';

export const metadata: Metadata = { title: 'Inspection lists' };

export default async function CheckListsPage() {
  const routes = await orNotFound(listCheckLists(await pageViewer()));
  const actions = { addList, removeList, addLine, changeLine, removeLine };
  return (
    <PageFrame
      title="Inspection lists"
      intro="What is looked at before paint and before the case closes, by route and stage. A build leaves the stage when its lists are passed; a list without lines holds nothing up."
    >
      {routes.map((route) => (
        <RouteSetup key={route.id} route={route} actions={actions} />
      ))}
    </PageFrame>
  );
}
