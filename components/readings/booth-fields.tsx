import { HumidityField, TemperatureField } from './air-fields';
import { shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';

/** The air something is sprayed in. */
export function BoothFields(props: FieldsProps) {
  return (
    <div className="grid gap-4">
      <TemperatureField {...props} />
      <HumidityField {...props} />
      <p className="text-sm text-soft">In which air a product may be put on stands on its data sheet.</p>
      <LiveReading reading={shownOf(props.read, 'booth_air')} />
    </div>
  );
}
