import { ButtonForm } from '@/components/people/button-form';
import { ConfirmForm } from '@/components/people/confirm-form';
import type { PersonPage } from '@/db/queries/access-review';
import { isStaffRole } from '@/lib/access';
import type { FormAction } from '@/lib/action';
import { clockWords, dayWords } from '@/lib/date-words';

type AccountToolsProps = {
  person: PersonPage;
  tools: { endSessions: FormAction; close: FormAction; reopen: FormAction };
  isOwn: boolean;
  zone: string;
  nowMs: number;
};

/** Signing somebody out, and closing or opening their account. */
export function AccountTools({ person, tools, isOwn, zone, nowMs }: AccountToolsProps) {
  const values = { userId: person.id };
  if (person.disabledAt !== null)
    return (
      <div className="grid gap-4">
        <p>
          Closed {dayWords(person.disabledAt, zone, nowMs)}. Opened again, the account has its name and its diary, and
          no assignments.
        </p>
        <ButtonForm send={tools.reopen} values={values}>
          Open the account again
        </ButtonForm>
      </div>
    );
  return (
    <div className="grid justify-items-start gap-4">
      <p>{sessionWords(person, zone, nowMs)}</p>
      {person.sessionCount > 0 && (
        <ConfirmForm
          send={tools.endSessions}
          values={values}
          label="Sign out everywhere"
          title={`Sign ${person.name} out everywhere?`}
          description="Every browser is signed out with its next request, and what is being written there and not yet sent waits on that device. They can sign in again at once."
        />
      )}
      {isOwn ? (
        <p className="text-soft">Your own role and account are changed by another admin.</p>
      ) : (
        <ConfirmForm
          send={tools.close}
          values={values}
          label="Close the account"
          title={`Close the account of ${person.name}?`}
          description={closeWords(person)}
        />
      )}
    </div>
  );
}

function sessionWords({ sessionCount, lastSeenAt }: PersonPage, zone: string, nowMs: number): string {
  if (sessionCount === 0 || lastSeenAt === null) return 'Signed in nowhere just now.';
  const where = sessionCount === 1 ? 'in one browser' : `in ${sessionCount} browsers`;
  return `Signed in ${where}, last used ${dayWords(lastSeenAt, zone, nowMs)} at ${clockWords(lastSeenAt, zone)}.`;
}

function closeWords({ role }: PersonPage): string {
  const start = 'They are signed out everywhere now and cannot sign in again.';
  const kept = 'What they wrote stays under their name. The account can be opened again later';
  return isStaffRole(role)
    ? `${start} They are taken off every build, and their rules end. ${kept}, without its assignments.`
    : `${start} Mail to them stops. Their builds stay theirs. ${kept}.`;
}
