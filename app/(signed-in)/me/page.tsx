import type { Metadata } from 'next';
import { keepAway, leaveOthers, saveKinds, saveMail, saveWords } from './actions';
import { ChoicesForm } from '@/components/mail/choices-form';
import { MailSettingsForm } from '@/components/mail/settings-form';
import { MailSentence } from '@/components/mail/settings-sentence';
import { WordingForm } from '@/components/mail/wording-form';
import { AwayForm } from '@/components/people/away-form';
import { ConfirmForm } from '@/components/people/confirm-form';
import { PageFrame, PageSection } from '@/components/people/page-frame';
import { workWords } from '@/components/people/person-words';
import { SessionList } from '@/components/people/session-list';
import { SignOut } from '@/components/people/sign-out';
import { Notice } from '@/components/ui/notice';
import { LinkButton } from '@/components/ui/button';
import { findAway } from '@/db/queries/away';
import { listChoices } from '@/db/queries/mail-choices';
import { findMailSettings, findWording } from '@/db/queries/mail-settings';
import { listOwnSessions, type SessionViewer } from '@/db/queries/sessions';
import { isStaffRole } from '@/lib/access';
import { pageViewer } from '@/lib/auth/page';
import { awayDays } from '@/lib/questions/away-days';
import { requestMs } from '@/lib/request';
import { soundZone } from '@/lib/schedule/digest-times';
import { listZones } from '@/lib/zones';

export const metadata: Metadata = { title: 'Your settings' };

export default async function MePage() {
  const viewer = await pageViewer();
  return (
    <PageFrame title={<bdi>{viewer.name}</bdi>} intro={<Facts viewer={viewer} />} tools={<Browsers viewer={viewer} />}>
      <Mail viewer={viewer} />
      {isStaffRole(viewer.role) && <OutOfOffice viewer={viewer} />}
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
  const [{ nextDigestAt, ...plan }, choices, { lostZone, ...wording }] = await Promise.all([
    findMailSettings(viewer),
    listChoices(viewer),
    findWording(viewer),
  ]);
  const side = isStaffRole(viewer.role) ? 'shop' : 'client';
  return (
    <>
      <PageSection title="Mail to you">
        {lostZone && (
          <Notice tone="late" title="Choose where you are again">
            Our clocks no longer know the time zone {lostZone}. Until you choose one, every hour here is UTC.
          </Notice>
        )}
        <MailSentence plan={plan} side={side} nextAt={nextDigestAt} zone={viewer.timeZone} nowMs={requestMs()} />
        <MailSettingsForm
          save={saveMail}
          plan={plan}
          side={side}
          zone={viewer.timeZone}
          zones={listZones(viewer.timeZone)}
        />
        <LinkButton href="/me/digest-preview" variant="quiet" className="justify-self-start">
          See what your next digest would say
        </LinkButton>
      </PageSection>
      <PageSection title="What comes how">
        <ChoicesForm save={saveKinds} choices={choices} />
      </PageSection>
      <PageSection title="Dates and measures">
        <WordingForm save={saveWords} {...wording} />
      </PageSection>
    </>
  );
}

async function OutOfOffice({ viewer }: { viewer: SessionViewer }) {
  const zone = soundZone(viewer.timeZone);
  const days = awayDays(await findAway(viewer), zone, requestMs());
  return (
    <PageSection title="Out of office">
      <p className="text-soft">
        On these days questions pass you over, and those you hold go to somebody else. Empty both days when you are
        here.
      </p>
      <AwayForm key={`${days.from} ${days.until}`} save={keepAway} {...days} />
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
