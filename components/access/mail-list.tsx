import { ButtonForm } from '@/components/people/button-form';
import type { TroubledMail } from '@/db/queries/outbox';
import type { FormAction } from '@/lib/action';
import { clockWords, dayWords } from '@/lib/date-words';

const kindWords: Record<TroubledMail['kind'], string> = {
  sign_in: 'sign-in link',
  invitation: 'invitation',
  digest: 'diary mail',
  question: 'a question',
  letter: 'a letter',
};

type MailListProps = { mails: TroubledMail[]; retry: FormAction; zone: string; nowMs: number };

/** Mail that has not gone out as it should, why, and what can be done about it. */
export function MailList({ mails, retry, zone, nowMs }: MailListProps) {
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
              {kindWords[mail.kind]}, written {when(mail.createdAt)}
            </p>
          </div>
          <div className="min-w-0 break-words">
            <p>
              <span className={mail.state === 'waiting' ? undefined : 'font-semibold text-late'}>{mail.state}</span>
              {mail.attempts > 0 && `, tried ${mail.attempts === 1 ? 'once' : `${mail.attempts} times`}`}
            </p>
            {mail.problem && <p className="text-sm text-soft">{mail.problem}</p>}
          </div>
          <NextStep mail={mail} retry={retry} nextTry={when(mail.nextAttemptAt)} />
        </li>
      ))}
    </ul>
  );
}

function NextStep({ mail, retry, nextTry }: { mail: TroubledMail; retry: FormAction; nextTry: string }) {
  const quiet = 'text-sm text-soft';
  if (mail.state === 'waiting') return <p className={quiet}>Tried again by itself on {nextTry}.</p>;
  if (mail.state === 'parked')
    return <p className={quiet}>It may have arrived. Sent again it could come twice, so it stays here.</p>;
  if (mail.kind === 'sign_in')
    return <p className={quiet}>Its link is dead by now. Its reader asks for a new one at the sign-in page.</p>;
  return (
    <ButtonForm send={retry} values={{ mailId: mail.id }} name={`Try again: ${kindWords[mail.kind]} to ${mail.person}`}>
      Try again
    </ButtonForm>
  );
}
