'use client';

import { clsx } from 'clsx';
import { EditorContent, useEditor, useEditorState, type Editor } from '@tiptap/react';
import { useEffect, useId, useState } from 'react';
import type { NoteDoc } from '@/lib/rich-text/doc';
import { readNote } from '@/lib/rich-text/read';
import { LinkField } from './link-field';
import { noteExtensions, restartLists, TYPED_FORMATS } from './note-extensions';
import { NoteFrame } from './note-frame';
import { NoteToolbar } from './note-toolbar';
import { WRITING_CLASSES } from './writing-classes';

export interface NoteEditorProps {
  /** A stored note or a draft to go on with; read once. Give the editor another `key` to start afresh. */
  initial?: unknown;
  label: string;
  placeholder?: string;
  onChange: (doc: NoteDoc) => void;
  disabled?: boolean;
  /** A sentence that says what is wrong with the note. */
  invalid?: string;
  /** Id of a text that explains the field. */
  describedBy?: string;
}

/** The rich-text field of an entry, a letter or a question. Load it through LazyNoteEditor: it is large. */
export function NoteEditor(props: NoteEditorProps) {
  const { initial, label, placeholder = '', onChange, disabled = false, invalid, describedBy } = props;
  const labelId = useId();
  const problemId = useId();
  const [isFull, setIsFull] = useState(false);
  const [extensions] = useState(() => noteExtensions(() => setIsFull(true)));
  const [content] = useState(() => readNote(initial));
  const problem = isFull ? 'That would make the note too long or too deep to keep, so it was left out.' : invalid;

  const editor = useEditor({
    extensions,
    content,
    editable: !disabled,
    immediatelyRender: false,
    shouldRerenderOnTransaction: false,
    enableInputRules: TYPED_FORMATS,
    injectCSS: false,
    editorProps: {
      transformPastedHTML: restartLists,
      attributes: {
        role: 'textbox',
        'aria-multiline': 'true',
        'aria-labelledby': labelId,
        'aria-placeholder': placeholder,
        'aria-invalid': String(Boolean(problem)),
        'aria-disabled': String(disabled),
        'aria-describedby': [describedBy, problemId].filter(Boolean).join(' '),
        class: WRITING_CLASSES,
      },
    },
    onUpdate: ({ editor }) => {
      setIsFull(false);
      const doc = readNote(editor.getJSON());
      if (doc) onChange(doc);
    },
  });

  useEffect(() => {
    editor?.setEditable(!disabled, false);
  }, [editor, disabled]);

  return (
    <NoteFrame
      label={label}
      labelId={labelId}
      problem={problem}
      problemId={problemId}
      onLabel={() => editor?.commands.focus()}
    >
      <div className="relative">
        <EditorContent editor={editor} className={clsx(disabled && 'opacity-60')} />
        {editor && <Placeholder editor={editor} text={placeholder} />}
      </div>
      {editor && <Tools editor={editor} disabled={disabled} />}
    </NoteFrame>
  );
}

function Placeholder({ editor, text }: { editor: Editor; text: string }) {
  const isEmpty = useEditorState({ editor, selector: ({ editor }) => editor.isEmpty });
  if (!isEmpty) return null;
  return (
    <p
      aria-hidden="true"
      className="pointer-events-none absolute inset-x-4 top-3 font-read text-[1.125rem] leading-[1.6] text-soft"
    >
      {text}
    </p>
  );
}

function Tools({ editor, disabled }: { editor: Editor; disabled: boolean }) {
  const [linkIsOpen, setLinkIsOpen] = useState(false);
  return (
    <div className="border-t border-line">
      <NoteToolbar
        editor={editor}
        disabled={disabled}
        linkIsOpen={linkIsOpen}
        onLink={() => setLinkIsOpen((open) => !open)}
      />
      {linkIsOpen && !disabled && <LinkField editor={editor} onClose={() => setLinkIsOpen(false)} />}
    </div>
  );
}
