import { ConfirmForm } from '@/components/people/confirm-form';
import type { FormAction } from '@/lib/action';

type TakeOffProps = { send: FormAction; assignmentId: string; personName: string; orderNumber: string };

/** Ends one assignment. */
export function TakeOff({ send, assignmentId, personName, orderNumber }: TakeOffProps) {
  return (
    <ConfirmForm
      send={send}
      values={{ assignmentId }}
      label="Take off"
      name={`Take off: ${personName}, ${orderNumber}`}
      title={`Take ${personName} off ${orderNumber}?`}
      description="They no longer see the build from their next request on, and hold no pen there that anybody can read. What they wrote stays in its diary. The owner can read that they left."
    />
  );
}
