/** A note as it is stored: ProseMirror JSON cut down to what the diary knows. Only rebuildNote makes one from outside input. */
export interface NoteDoc {
  type: 'doc';
  content: NoteBlock[];
}

export type NoteMark =
  { type: 'link'; attrs: { href: string } } | { type: 'bold' } | { type: 'code' } | { type: 'italic' };

export interface NoteWords {
  type: 'text';
  text: string;
  marks?: NoteMark[];
}

export type NoteInline = NoteWords | { type: 'hardBreak' };

export interface NoteParagraph {
  type: 'paragraph';
  content?: NoteInline[];
}

export interface NoteHeading {
  type: 'heading';
  attrs: { level: 2 | 3 };
  content?: NoteInline[];
}

export interface NoteListItem {
  type: 'listItem';
  content: NoteBlock[];
}

export interface NoteList {
  type: 'bulletList' | 'orderedList';
  content: NoteListItem[];
}

export interface NoteQuote {
  type: 'blockquote';
  content: NoteBlock[];
}

export type NoteBlock = NoteParagraph | NoteHeading | NoteList | NoteQuote;
export type NoteNode = NoteDoc | NoteBlock | NoteListItem | NoteInline;
