import { clsx } from 'clsx';

interface NoteFrameProps {
  label: string;
  labelId: string;
  problem?: string;
  problemId: string;
  /** A press on the label; a label element cannot name an editable region. */
  onLabel?: () => void;
  children: React.ReactNode;
}

/** The label, the box and the error line around whatever the note is written in. */
export function NoteFrame({ label, labelId, problem, problemId, onLabel, children }: NoteFrameProps) {
  return (
    <div className="font-sans">
      <span id={labelId} onClick={onLabel} className="mb-1 block font-medium text-ink">
        {label}
      </span>
      <div
        className={clsx(
          'rounded-md border-2 bg-sheet focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-finish-deep',
          problem ? 'border-late' : 'border-ink',
        )}
      >
        {children}
      </div>
      <p id={problemId} role="alert" className="mt-1 text-late empty:hidden">
        {problem}
      </p>
    </div>
  );
}
