import type { Metadata } from 'next';
import { concede, deliver, link, pass, ship, unlink } from './actions';
import { CheckLines } from '@/components/checks/check-lines';
import { ConcessionForm } from '@/components/checks/concession-form';
import { LinkForm } from '@/components/checks/link-form';
import { NextStep } from '@/components/checks/next-step';
import { PassPanel } from '@/components/checks/pass-panel';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { listStages } from '@/db/queries/builds';
import { readFinalCheck } from '@/db/queries/final-check';
import { shopDay } from '@/db/queries/calendar';
import { listLinkableEntries } from '@/db/queries/proofs';
import { can, type Action } from '@/lib/access';
import { openBuild, orNotFound } from '@/lib/auth/page';
import { shortDay } from '@/lib/date-words';
import { requestMs } from '@/lib/request';
import { dueRange } from '@/lib/sign-offs/due-day';
import { openLines, type ProofLine } from '@/lib/specs/proof';

export async function generateMetadata({ params }: PageProps<'/builds/[orderNumber]/final-check'>): Promise<Metadata> {
  return { title: `Final check of ${(await params).orderNumber}` };
}

const asOption = ({ item }: ProofLine) => ({ value: item.key, label: item.label });

export default async function FinalCheckPage({ params }: PageProps<'/builds/[orderNumber]/final-check'>) {
  const { orderNumber } = await params;
  const { viewer, build } = await openBuild(orderNumber);
  const check = await orNotFound(readFinalCheck(viewer, orderNumber));
  const nowMs = requestMs();
  const [stages, entries, today] = await Promise.all([
    listStages(viewer, build.id),
    listLinkableEntries(viewer, orderNumber),
    shopDay(nowMs),
  ]);
  const may = (action: Action) => can(viewer.role, build.standing, action);
  const { lines, version } = check.sheet;
  const open = openLines(lines);
  const settled = lines.filter((line) => !open.includes(line));
  const around = {
    orderNumber,
    stageNames: Object.fromEntries(stages.map(({ key, name }) => [key, name])),
    zone: viewer.timeZone,
    unlink: check.readyAt === null ? unlink : undefined,
  };
  const nextOf = (line: ProofLine) => <NextStep line={line} {...around} />;
  return (
    <PageFrame
      over={<span className="narrow">Order {orderNumber}</span>}
      title="Final check"
      intro={
        version
          ? `Every item of version ${version.number}, which ${version.signedName} signed, is proven by a reading or an entry, or let pass by its owner, before the case closes.`
          : undefined
      }
    >
      <PassPanel
        check={check}
        orderNumber={orderNumber}
        zone={viewer.timeZone}
        nowMs={nowMs}
        pass={pass}
        shipping={may('build.ship') ? { ship, deliver } : undefined}
      />
      {open.length > 0 && (
        <PageSection title={open.length === 1 ? 'One item is open' : `${open.length} items are open`}>
          <CheckLines caption="Open items" lastColumn="What is next" lines={open} nextOf={nextOf} />
        </PageSection>
      )}
      {open.length > 0 && may('sign_off.ask') && (
        <PageSection title="Ask the owner for a concession">
          <ConcessionForm ask={concede} orderNumber={orderNumber} items={open.map(asOption)} range={dueRange(today)} />
        </PageSection>
      )}
      {lines.length > 0 && (
        <PageSection title="Link an entry as proof">
          <LinkForm
            link={link}
            orderNumber={orderNumber}
            items={lines.map(asOption)}
            entries={entries.map(({ id, datedAt, stageName, words }) => ({
              value: id,
              label: `${shortDay(datedAt, viewer.timeZone)}, ${stageName}: ${words}`,
            }))}
          />
        </PageSection>
      )}
      {settled.length > 0 && (
        <PageSection title={`${settled.length} of ${lines.length} items are settled`}>
          <CheckLines caption="Settled items" lastColumn="Proof" lines={settled} nextOf={nextOf} />
        </PageSection>
      )}
    </PageFrame>
  );
}
