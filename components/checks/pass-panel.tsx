import { ShipForm } from './ship-form';
import { ConfirmForm } from '@/components/people/confirm-form';
import { Notice } from '@/components/ui/notice';
import type { FinalCheck } from '@/db/queries/final-check';
import type { FormAction } from '@/lib/action';
import { dayWords } from '@/lib/date-words';

type PassPanelProps = {
  check: FinalCheck;
  orderNumber: string;
  zone: string;
  nowMs: number;
  pass: FormAction;
  /** For who may ship. */
  shipping?: { ship: FormAction; deliver: FormAction };
};

/** Whether the build may leave, the press of the button that says so, and what became of it since. */
export function PassPanel({ check, orderNumber, zone, nowMs, pass, shipping }: PassPanelProps) {
  const { obstacles, readyAt, shippedAt, shippedBy, deliveredAt } = check;
  const day = (ms: number) => dayWords(ms, zone, nowMs);
  if (readyAt === null) return <Unpassed obstacles={obstacles} orderNumber={orderNumber} pass={pass} />;
  return (
    <div className="grid gap-6">
      <Notice tone="done" title={`Ready since ${day(readyAt)}`}>
        {shippedAt !== null && <p>{`Shipped with ${shippedBy ?? 'a carrier'} on ${day(shippedAt)}.`}</p>}
        {deliveredAt !== null && <p>{`Delivered on ${day(deliveredAt)}.`}</p>}
        {shippedAt === null && <p>The final check has passed, and its owner has been told.</p>}
      </Notice>
      {shipping && deliveredAt === null && (
        <ShipForm ship={shipping.ship} orderNumber={orderNumber} shippedBy={shippedBy} />
      )}
      {shipping && shippedAt !== null && deliveredAt === null && (
        <ConfirmForm
          send={shipping.deliver}
          values={{ orderNumber }}
          label="It has arrived"
          title={`Mark ${orderNumber} as delivered?`}
          description="It leaves the floor. Its diary, spec and sheet stay open to its owner."
        />
      )}
    </div>
  );
}

function Unpassed({
  obstacles,
  orderNumber,
  pass,
}: Pick<FinalCheck, 'obstacles'> & { orderNumber: string; pass: FormAction }) {
  if (obstacles.length > 0)
    return (
      <Notice tone="brass" title="It cannot pass yet">
        <ul className="grid list-disc gap-1 pl-5">
          {obstacles.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      </Notice>
    );
  return (
    <Notice tone="done" title="Everything signed is proven, or let pass">
      <div className="mt-2">
        <ConfirmForm
          send={pass}
          values={{ orderNumber }}
          variant="primary"
          label="Pass the final check"
          title={`Pass the final check of ${orderNumber}?`}
          description="The last stage ends, the build is ready, and its owner gets a mail."
        />
      </div>
    </Notice>
  );
}
