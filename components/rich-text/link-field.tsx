'use client';

import type { Editor } from '@tiptap/react';
import { useId, useState } from 'react';
import { typedHref } from '@/lib/rich-text/links';

const BUTTON = 'min-h-12 rounded px-4 font-medium focus-visible:outline-2 focus-visible:outline-offset-2';

/** The address of the link at the cursor, or of a new one over the selected words. Lies inside the form, sends nothing. */
export function LinkField({ editor, onClose }: { editor: Editor; onClose: () => void }) {
  const present = hrefAtCursor(editor);
  const [typed, setTyped] = useState(present);
  const [isWrong, setIsWrong] = useState(false);
  const inputId = useId();
  const errorId = useId();

  function save() {
    const href = typedHref(typed);
    if (href === null) return setIsWrong(true);
    setLink(editor, href, typed.trim());
    onClose();
  }

  function press(event: React.KeyboardEvent) {
    if (event.key !== 'Enter' && event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
    if (event.key === 'Enter') return save();
    editor.commands.focus();
    onClose();
  }

  return (
    <div
      className="flex flex-wrap items-center gap-2 border-t border-line p-3 font-sans"
      onKeyDown={(event) => event.key === 'Escape' && press(event)}
    >
      <label htmlFor={inputId} className="basis-full text-soft">
        Web or mail address
      </label>
      <input
        id={inputId}
        type="text"
        inputMode="url"
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
        autoFocus
        value={typed}
        aria-invalid={isWrong}
        aria-describedby={isWrong ? errorId : undefined}
        onChange={(event) => setTyped(event.target.value)}
        onKeyDown={press}
        className="min-h-12 min-w-0 flex-1 basis-60 rounded border border-soft bg-sheet px-3 text-ink"
      />
      <button type="button" onClick={save} className={`${BUTTON} bg-finish-deep text-sheet`}>
        {present === '' ? 'Add link' : 'Change link'}
      </button>
      {present !== '' && (
        <button
          type="button"
          onClick={() => {
            removeLink(editor);
            onClose();
          }}
          className={`${BUTTON} text-finish-deep underline`}
        >
          Remove link
        </button>
      )}
      <p id={errorId} role="alert" className="basis-full text-late empty:hidden">
        {isWrong && 'This is no web or mail address. Write one like https://example.com or ann@example.com.'}
      </p>
    </div>
  );
}

function hrefAtCursor(editor: Editor): string {
  const href: unknown = editor.getAttributes('link').href;
  return typeof href === 'string' ? href : '';
}

function setLink(editor: Editor, href: string, words: string) {
  const needsWords = editor.state.selection.empty && !editor.isActive('link');
  if (needsWords) {
    const link = { type: 'text', text: words, marks: [{ type: 'link', attrs: { href } }] };
    return editor
      .chain()
      .focus()
      .insertContent([link, { type: 'text', text: ' ' }])
      .run();
  }
  return editor.chain().focus().extendMarkRange('link').setLink({ href }).run();
}

function removeLink(editor: Editor) {
  editor.chain().focus().extendMarkRange('link').unsetLink().run();
}
