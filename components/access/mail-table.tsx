import { ButtonForm } from '@/components/people/button-form';
import { Cell, Row, RowHead, Table } from '@/components/ui/table';
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

const columns = [
  { key: 'person', label: 'To' },
  { key: 'state', label: 'How it stands' },
  { key: 'written', label: 'Written', className: 'whitespace-nowrap' },
  { key: 'step', label: 'What can be done' },
];

type MailTableProps = { mails: TroubledMail[]; retry: FormAction; zone: string; nowMs: number };

/** Mail that has not gone out as it should, why, and what can be done about it. */
export function MailTable({ mails, retry, zone, nowMs }: MailTableProps) {
  const when = (ms: number) => `${dayWords(ms, zone, nowMs)}, ${clockWords(ms, zone)}`;
  return (
    <Table caption="Mail that needs a look" columns={columns}>
      {mails.map((mail) => (
        <Row key={mail.id}>
          <RowHead note={kindWords[mail.kind]}>
            <bdi>{mail.person}</bdi>
          </RowHead>
          <Cell note={mail.problem ?? undefined} className="min-w-52">
            <span className={mail.state === 'waiting' ? undefined : 'font-semibold text-late'}>{mail.state}</span>
            {mail.attempts > 0 && `, tried ${mail.attempts === 1 ? 'once' : `${mail.attempts} times`}`}
          </Cell>
          <Cell className="narrow whitespace-nowrap">{when(mail.createdAt)}</Cell>
          <Cell className="min-w-52">
            <NextStep mail={mail} retry={retry} nextTry={when(mail.nextAttemptAt)} />
          </Cell>
        </Row>
      ))}
    </Table>
  );
}

function NextStep({ mail, retry, nextTry }: { mail: TroubledMail; retry: FormAction; nextTry: string }) {
  const quiet = 'text-sm text-soft';
  if (mail.state === 'waiting') return <p className={quiet}>Tried again by itself: {nextTry}.</p>;
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
