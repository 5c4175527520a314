const SENTENCES = {
  blank: 'This note has no words yet. Write something first.',
  broken: 'This note could not be read. Copy your words, reload the page and try again.',
  foreign: 'This note holds something that cannot be kept, such as a picture or a table. Take it out and try again.',
  link: 'A link in this note does not lead to a web page or a mail address. Correct it or take it out.',
  marks: 'Some words in this note carry too much formatting at once. Take some of it off and try again.',
  deep: 'The lists and quotes in this note lie too deep in each other. Take some of them apart.',
  long: 'This note is too long. Shorten it, or post it as two entries.',
} as const;

/** A note that will not be kept; the message is a sentence for its writer. */
export class NoteRefusal extends Error {
  override name = 'NoteRefusal';

  constructor(reason: keyof typeof SENTENCES) {
    super(SENTENCES[reason]);
  }
}

/** Stands where a stored note cannot be shown. */
export const NOTE_PLACEHOLDER = 'This note could not be shown. Ask the shop to look into it.';
