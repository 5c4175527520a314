/** A pitch by its written name; middle C is C4, MIDI 60. */
export type Note = { letter: string; accidental: '' | '#' | 'b'; octave: number; midi: number };

const semitones: Record<string, number> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };
const shifts = { '': 0, '#': 1, b: -1 } as const;

/** Concert pitch of ISO 16:1975. */
const CONCERT_A4_HZ = 440;
const LOWEST_MIDI = 9;
const HIGHEST_MIDI = 127;

/** Reads `E2`, `f#1`, `F♯1`, `Bb0`; refused with a sentence when the letter, the octave or the pitch is none. */
export function readNote(text: string): { ok: true; note: Note } | { ok: false; message: string } {
  const plain = text.trim().replace('♯', '#').replace('♭', 'b');
  const [, letter, accidental = '', octaveText = ''] = /^([A-Ga-g])([#b]?)(-?\d?)$/.exec(plain) ?? [];
  if (!letter || !isAccidental(accidental)) {
    return {
      ok: false,
      message: `"${text.trim().slice(0, 12)}" is not a note. Write a letter from A to G and its octave, such as E2, F#2 or Bb1.`,
    };
  }
  if (!/\d/.test(octaveText)) {
    return { ok: false, message: `${plain} needs its octave: E2 is a guitar's low E, E4 its high one.` };
  }
  const upper = letter.toUpperCase();
  const midi = (Number(octaveText) + 1) * 12 + (semitones[upper] ?? 0) + shifts[accidental];
  if (midi < LOWEST_MIDI || midi > HIGHEST_MIDI) {
    return { ok: false, message: `No string sounds ${plain}. Look at the octave: E2 is a guitar's low E.` };
  }
  return { ok: true, note: { letter: upper, accidental, octave: Number(octaveText), midi } };
}

/** Reads notes parted by spaces, commas or dashes, in the order they stand. */
export function readNotes(text: string): { ok: true; notes: Note[] } | { ok: false; message: string } {
  const words = text.split(/[\s,;]+|(?<=\d)-/).filter((word) => word !== '');
  if (words.length === 0)
    return { ok: false, message: 'Write the tuning with its octaves, such as E2 A2 D3 G3 B3 E4.' };
  const notes: Note[] = [];
  for (const word of words) {
    const read = readNote(word);
    if (!read.ok) return read;
    notes.push(read.note);
  }
  return { ok: true, notes };
}

/** `F♯2`, or `F♯` without its octave. */
export function noteWords({ letter, accidental, octave }: Note, withOctave = true): string {
  const sign = { '': '', '#': '♯', b: '♭' }[accidental];
  return `${letter}${sign}${withOctave ? octave : ''}`;
}

/** Hz in equal temperament, F = A4 x 2^((m - 69) / 12); A4 is 440 Hz by ISO 16 unless given. @throws RangeError when a4Hz is not above 0 */
export function noteFrequencyHz(midi: number, a4Hz: number = CONCERT_A4_HZ): number {
  if (!(a4Hz > 0 && Number.isFinite(a4Hz))) throw new RangeError(`Concert pitch is above 0 Hz; got ${a4Hz}.`);
  return a4Hz * 2 ** ((midi - 69) / 12);
}

function isAccidental(sign: string): sign is Note['accidental'] {
  return sign === '' || sign === '#' || sign === 'b';
}
