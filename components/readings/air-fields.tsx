import { saidAt, type FieldsProps } from './fields';
import { ReadingInput } from './reading-input';
import { Segmented } from '@/components/ui/segmented';

const units = [
  { value: 'C', label: '°C' },
  { value: 'F', label: '°F' },
];

/** The temperature of a room, in the unit its thermometer shows. */
export function TemperatureField(props: FieldsProps) {
  const { typed, onType } = props;
  return (
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
  );
}

export function HumidityField(props: FieldsProps) {
  return (
    <ReadingInput
      label="Humidity"
      unit="%"
      value={props.typed.humidity}
      onType={(humidity) => props.onType({ humidity })}
      {...saidAt('humidity', props)}
    />
  );
}
