'use client';

import dynamic from 'next/dynamic';
import { PlainNoteEditor } from './plain-note-editor';

/** NoteEditor, fetched when a page with a note field opens. If it cannot be fetched, plain words can be written. */
export const LazyNoteEditor = dynamic(
  () =>
    import('./note-editor').then(
      ({ NoteEditor }) => NoteEditor,
      () => PlainNoteEditor,
    ),
  { ssr: false, loading: NoteEditorSkeleton },
);

/** As high as the empty editor on a wide screen: label, writing space, one row of buttons. */
function NoteEditorSkeleton() {
  return (
    <div role="status" className="font-sans">
      <div className="mb-1 h-6" />
      <div className="rounded-md border-2 border-line bg-sheet">
        <p className="min-h-40 px-4 py-3 text-soft">The note field is being fetched.</p>
        <div className="h-[49px] border-t border-line" />
      </div>
    </div>
  );
}
