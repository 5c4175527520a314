import { ConfirmForm } from './confirm-form';
import { HoldForm } from './hold-form';
import { PageSection } from './page-frame';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';
import { placeWords } from '@/lib/mail/plan-words';

type HoldToolsProps = {
  orderNumber: string;
  heldUntilAt: number | null;
  range: { first: string; last: string };
  hold: FormAction;
  open: FormAction;
  zone: string;
  nowMs: number;
};

/** A rep holds a build from view, or opens it. */
export function HoldTools({ orderNumber, heldUntilAt, range, hold, open, zone, nowMs }: HoldToolsProps) {
  return (
    <PageSection title="Hold from view">
      <p className="text-soft">
        While it is held, only its owner and the staff marked as cleared see this build. Companions and everybody else
        at the shop are shut out at once, and mail about it carries no photo, no name and no note.
      </p>
      {heldUntilAt !== null && (
        <div className="grid justify-items-start gap-3">
          <p className="font-semibold text-brass-deep">Held until {dayWords(heldUntilAt, zone, nowMs)}.</p>
          <ConfirmForm
            send={open}
            values={{ orderNumber }}
            label="Open it now"
            title={`Open ${orderNumber} to view?`}
            description="Its companions and all staff on it see the whole diary at once, with everything written while it was held."
          />
        </div>
      )}
      <HoldForm
        hold={hold}
        orderNumber={orderNumber}
        range={range}
        placeWords={placeWords(zone)}
        isHeld={heldUntilAt !== null}
      />
    </PageSection>
  );
}
