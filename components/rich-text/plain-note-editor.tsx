'use client';

import { useId, useState } from 'react';
import { noteText, plainNote } from '@/lib/rich-text/plain-text';
import { readNote } from '@/lib/rich-text/read';
import type { NoteEditorProps } from './note-editor';
import { NoteFrame } from './note-frame';

/** Stands in where the editor could not be fetched, as in a shop with bad signal: words and lines, no formats. */
export function PlainNoteEditor({
  initial,
  label,
  placeholder,
  onChange,
  disabled,
  invalid,
  describedBy,
}: NoteEditorProps) {
  const labelId = useId();
  const problemId = useId();
  const hintId = useId();
  const [text, setText] = useState(() => (readNote(initial) ? noteText(initial) : ''));

  function write(next: string) {
    setText(next);
    onChange(plainNote(next));
  }

  return (
    <NoteFrame label={label} labelId={labelId} problem={invalid} problemId={problemId}>
      <textarea
        aria-labelledby={labelId}
        aria-describedby={[describedBy, hintId, problemId].filter(Boolean).join(' ')}
        aria-invalid={Boolean(invalid)}
        placeholder={placeholder}
        disabled={disabled}
        value={text}
        onChange={(event) => write(event.target.value)}
        className="block min-h-40 w-full bg-transparent px-4 py-3 font-read text-[1.125rem] leading-[1.6] text-ink outline-none"
      />
      <p id={hintId} className="min-h-12 border-t border-line px-4 py-3 text-soft">
        Formats could not be loaded. Plain words are kept; reload the page to get the formats back.
      </p>
    </NoteFrame>
  );
}
