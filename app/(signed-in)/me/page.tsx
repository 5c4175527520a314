import type { Metadata } from 'next';
import { leaveOthers, saveMail, saveZone } from './actions';
import { MailSettingsForm, ZoneForm } from '@/components/mail/settings-form';
import { MailSentence } from '@/components/mail/settings-sentence';
import { ConfirmForm } from '@/components/people/confirm-form';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { workWords } from '@/components/people/person-words';
import { SessionList } from '@/components/people/session-list';
import { SignOut } from '@/components/people/sign-out';
import { findMailSettings } from '@/db/queries/mail-settings';
import { listOwnSessions, type SessionViewer } from '@/db/queries/sessions';
import { isStaffRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { requestMs } from '@/lib/request';
import { listZones } from '@/lib/zones';

export const metadata: Metadata = { title: 'Your settings' };

export default async function MePage() {
  const viewer = await pageViewer();
  return (
    <PageFrame title={<bdi>{viewer.name}</bdi>} intro={<Facts viewer={viewer} />} tools={<Browsers viewer={viewer} />}>
      {isStaffRole(viewer.role) ? <Clock viewer={viewer} /> : <Mail viewer={viewer} />}
    </PageFrame>
  );
}

function Facts({ viewer }: { viewer: SessionViewer }) {
  return (
    <p className="flex flex-wrap gap-x-4">
      <span className="break-all">{viewer.email}</span>
      <span>{workWords(viewer)}</span>
    </p>
  );
}

async function Mail({ viewer }: { viewer: SessionViewer }) {
  const { nextDigestAt, ...plan } = await findMailSettings(viewer);
  return (
    <PageSection title="Mail to you">
      <MailSentence plan={plan} nextAt={nextDigestAt} zone={viewer.timeZone} nowMs={requestMs()} />
      <MailSettingsForm save={saveMail} plan={plan} zone={viewer.timeZone} zones={listZones(viewer.timeZone)} />
    </PageSection>
  );
}

function Clock({ viewer }: { viewer: SessionViewer }) {
  return (
    <PageSection title="Your clock">
      <ZoneForm save={saveZone} zone={viewer.timeZone} zones={listZones(viewer.timeZone)} />
    </PageSection>
  );
}

async function Browsers({ viewer }: { viewer: SessionViewer }) {
  const sessions = await listOwnSessions(viewer, requestMs());
  return (
    <PageSection title="Where you are signed in">
      <SessionList sessions={sessions} ownId={viewer.sessionId} zone={viewer.timeZone} nowMs={requestMs()} />
      <div className="flex flex-wrap gap-3">
        {sessions.length > 1 && (
          <ConfirmForm
            send={leaveOthers}
            values={{}}
            label="Sign out everywhere else"
            title="Sign out everywhere else?"
            description="Every browser but this one is signed out with its next request. To come back there, ask for a new link."
          />
        )}
        <SignOut />
      </div>
    </PageSection>
  );
}
