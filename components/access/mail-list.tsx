import { ButtonForm } from '@/components/people/button-form';
import type { WatchedMail } from '@/db/queries/mail-watch';
import type { FormAction } from '@/lib/action';
import { clockWords, dayWords } from '@/lib/date-words';
import { mailRules } from '@/lib/mail/choices';

type MailListProps = { mails: WatchedMail[]; retry: FormAction; sendAgain: FormAction; zone: string; nowMs: number };

/** Mail, what became of it, why, and what can be done about it. */
export function MailList({ mails, retry, sendAgain, zone, nowMs }: MailListProps) {
  const when = (ms: number) => `${dayWords(ms, zone, nowMs)} at ${clockWords(ms, zone)}`;
  return (
    <ul role="list" className="border-t-2 border-ink">
      {mails.map((mail) => (
        <li
          key={mail.id}
          className="grid gap-x-8 gap-y-2 border-b border-line py-3 md:grid-cols-[15rem_minmax(0,1fr)_18rem]"
        >
          <div>
            <p className="font-semibold">
              <bdi>{mail.person}</bdi>
            </p>
            <p className="text-sm text-soft">
              {mailRules[mail.kind].words}, written {when(mail.createdAt)}
            </p>
          </div>
          <MailState mail={mail} when={when} />
          <NextStep mail={mail} retry={retry} sendAgain={sendAgain} nextTry={when(mail.nextAttemptAt)} />
        </li>
      ))}
    </ul>
  );
}

const isTrouble = ({ state, bouncedAt, complainedAt }: WatchedMail) =>
  state === 'failed' || state === 'parked' || bouncedAt !== null || complainedAt !== null;

function MailState({ mail, when }: { mail: WatchedMail; when: (ms: number) => string }) {
  const { attempts, sentAt, deliveredAt, bouncedAt, complainedAt } = mail;
  const told = [
    attempts > 1 || (attempts === 1 && mail.state !== 'sent')
      ? `tried ${attempts === 1 ? 'once' : `${attempts} times`}`
      : '',
    sentAt === null ? '' : when(sentAt),
    deliveredAt === null ? '' : `delivered ${when(deliveredAt)}`,
    bouncedAt === null ? '' : `came back ${when(bouncedAt)}`,
    complainedAt === null ? '' : `called unwanted ${when(complainedAt)}`,
  ];
  return (
    <div className="min-w-0 break-words">
      <p>
        <span className={isTrouble(mail) ? 'font-semibold text-late' : undefined}>{mail.state}</span>
        {told.filter(Boolean).map((words) => `, ${words}`)}
      </p>
      {mail.problem && <p className="text-sm text-soft">{mail.problem}</p>}
    </div>
  );
}

type NextStepProps = { mail: WatchedMail; retry: FormAction; sendAgain: FormAction; nextTry: string };

function NextStep({ mail, retry, sendAgain, nextTry }: NextStepProps) {
  const quiet = 'text-sm text-soft';
  const { words } = mailRules[mail.kind];
  if (mail.state === 'waiting' || mail.state === 'sending')
    return <p className={quiet}>Goes out by itself on {nextTry}.</p>;
  if (mail.kind === 'sign_in')
    return <p className={quiet}>Its link is dead by now. Its reader asks for a new one at the sign-in page.</p>;
  if (mail.state === 'failed')
    return (
      <ButtonForm send={retry} values={{ mailId: mail.id }} name={`Try again: ${words} to ${mail.person}`}>
        Try again
      </ButtonForm>
    );
  return (
    <div className="grid justify-items-start gap-2">
      {mail.state === 'parked' && <p className={quiet}>It may have arrived. Sent again it could come twice.</p>}
      <ButtonForm send={sendAgain} values={{ mailId: mail.id }} name={`Send once more: ${words} to ${mail.person}`}>
        Send once more
      </ButtonForm>
    </div>
  );
}
