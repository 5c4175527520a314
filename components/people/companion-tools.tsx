import { CompanionForm } from './companion-form';
import { ConfirmForm } from './confirm-form';
import { PageSection } from './page-frame';
import { PersonLine } from './person-line';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';

type CompanionToolsProps = {
  orderNumber: string;
  companions: { id: string; name: string; email: string | null }[];
  heldUntilAt: number | null;
  letLookOn: FormAction;
  stopLookingOn: FormAction;
  zone: string;
  nowMs: number;
};

/** The owner's companions: who looks on, and asking somebody to. */
export function CompanionTools({ orderNumber, companions, heldUntilAt, ...rest }: CompanionToolsProps) {
  const { letLookOn, stopLookingOn, zone, nowMs } = rest;
  return (
    <PageSection title="Companions">
      <p className="text-soft">
        Somebody you let look on reads the diary and sees its photos, and nothing else: no questions, no letters, no
        settings.
      </p>
      <ul role="list" className="empty:hidden">
        {companions.map(({ id, name, email }) => (
          <PersonLine
            key={id}
            name={name}
            note={<span className="break-all">{email}</span>}
            action={
              <ConfirmForm
                send={stopLookingOn}
                values={{ orderNumber, userId: id }}
                label="Remove"
                name={`Remove ${name}`}
                title={`Stop ${name} looking on?`}
                description="They no longer see this diary from their next request on. You can let them look on again."
              />
            }
          />
        ))}
      </ul>
      {heldUntilAt === null ? (
        <CompanionForm add={letLookOn} orderNumber={orderNumber} />
      ) : (
        <p className="font-semibold text-brass-deep">
          This build is held from view until {dayWords(heldUntilAt, zone, nowMs)}. Nobody looks on until then, and
          nobody can be added.
        </p>
      )}
    </PageSection>
  );
}
