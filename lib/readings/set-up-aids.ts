import { intonationVerdict, type IntonationVerdict } from '../craft/cents';
import { wrong, type Doubt } from '../craft/doubt';
import { trussRodTrouble } from '../craft/set-up';
import { readNumberField } from './number-field';

/** What to say of a turn of the truss rod as typed, before it is made; null while nothing is typed and where it is fine. */
export function turnDoubt(text: string): Doubt | null {
  const { value, doubt } = readNumberField(text, ['turn', 'turns']);
  if (doubt || value === null) return doubt;
  const trouble = trussRodTrouble(value);
  return trouble === null ? null : wrong(trouble);
}

export type TwoNotes = { fretted: string; harmonic: string };
export type NotesRead = { doubts: { fretted?: Doubt; harmonic?: Doubt }; found: IntonationVerdict | null };

/** Further apart than this the two were not one note: a semitone. */
const SANE_CENTS = 100;

/** How far the note at the 12th fret is off its harmonic, from two frequencies in Hz as typed. */
export function readTwoNotes({ fretted, harmonic }: TwoNotes, limitCents: number): NotesRead {
  const [one, other] = [readHz(fretted), readHz(harmonic)];
  const doubts = { ...(one.doubt && { fretted: one.doubt }), ...(other.doubt && { harmonic: other.doubt }) };
  if (one.hz === null || other.hz === null) return { doubts, found: null };
  const found = intonationVerdict(one.hz, other.hz, limitCents);
  if (Math.abs(found.cents) <= SANE_CENTS) return { doubts, found };
  const sentence = 'These two are more than a semitone apart. Check that both are the note at the 12th fret.';
  return { doubts: { fretted: wrong(sentence) }, found: null };
}

function readHz(text: string): { hz: number | null; doubt: Doubt | null } {
  const { value, doubt } = readNumberField(text, ['hz']);
  if (doubt || value === null) return { hz: null, doubt };
  if (value >= 20 && value <= 5000) return { hz: value, doubt: null };
  return { hz: null, doubt: wrong('No string sounds there. Write the frequency in Hz, such as 164.8.') };
}
