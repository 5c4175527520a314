import { saidAt, shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { ReadingInput } from './reading-input';
import { Segmented } from '@/components/ui/segmented';

const units = [
  { value: 'C', label: '°C' },
  { value: 'F', label: '°F' },
];

/** The air of the wood room and, where it was taken, the moisture of the wood. */
export function WoodRoomFields(props: FieldsProps) {
  const { typed, read, onType } = props;
  return (
    <div className="grid gap-4">
      <div className="grid grid-cols-[minmax(0,1fr)_9rem] items-start gap-3">
        <ReadingInput
          label="Temperature"
          value={typed.temperature}
          onType={(temperature) => onType({ temperature })}
          {...saidAt('temperature', props)}
        />
        <Segmented
          legend="Unit"
          name="temperature-unit"
          size="bench"
          options={units}
          value={typed.temperatureUnit}
          onChange={({ target }) => onType({ temperatureUnit: target.value === 'F' ? 'F' : 'C' })}
        />
      </div>
      <div className="grid grid-cols-2 items-start gap-3">
        <ReadingInput
          label="Humidity"
          unit="%"
          value={typed.humidity}
          onType={(humidity) => onType({ humidity })}
          {...saidAt('humidity', props)}
        />
        <ReadingInput
          label="Moisture of the wood"
          unit="%"
          value={typed.moisture}
          onType={(moisture) => onType({ moisture })}
          {...saidAt('moisture', props)}
        />
      </div>
      <LiveReading reading={shownOf(read, 'wood_room')} />
    </div>
  );
}
