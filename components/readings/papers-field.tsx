import { saidAt, shownOf, type FieldsProps } from './fields';
import { LiveReading } from './live-reading';
import { ReadingInput } from './reading-input';

/** The papers that were used, in their order. */
export function PapersField(props: FieldsProps) {
  const { typed, read, onType } = props;
  return (
    <div className="grid gap-4">
      <ReadingInput
        label="Papers, coarse to fine"
        hint="Such as P320, P500, P800."
        inputMode="text"
        maxLength={160}
        value={typed.papers}
        onType={(papers) => onType({ papers })}
        {...saidAt('papers', props)}
      />
      <LiveReading reading={shownOf(read, 'abrasives')} />
    </div>
  );
}
