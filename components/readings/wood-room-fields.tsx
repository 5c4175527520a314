import { HumidityField, TemperatureField } from './air-fields';
import { saidAt, shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { ReadingInput } from './reading-input';
import { aimedMoisture, holdingWords } from '@/lib/readings/wood-room';

/** The air of the wood room and, where it was taken, the moisture of the wood. */
export function WoodRoomFields(props: FieldsProps) {
  const { typed, plan, read, onType } = props;
  const air = read.readings.find(({ value }) => value.kind === 'wood_room')?.value;
  const holding = air?.kind === 'wood_room' ? holdingWords(air, aimedMoisture(plan.lines)) : null;
  return (
    <div className="grid gap-4">
      <TemperatureField {...props} />
      <div className="grid grid-cols-2 items-start gap-3">
        <HumidityField {...props} />
        <ReadingInput
          label="Moisture of the wood"
          unit="%"
          value={typed.moisture}
          onType={(moisture) => onType({ moisture })}
          {...saidAt('moisture', props)}
        />
      </div>
      <LiveReading reading={shownOf(read, 'wood_room')} />
      <p aria-live="polite" className="text-sm text-soft empty:hidden">
        {holding}
      </p>
    </div>
  );
}
