import { Extension, type Extensions } from '@tiptap/core';
import { Plugin } from '@tiptap/pm/state';
import { StarterKit } from '@tiptap/starter-kit';
import { safeHref } from '@/lib/rich-text/links';
import { readNote } from '@/lib/rich-text/read';

/** Typing these starts the matching format. Numbered lists are left out: one begun at 3 would be stored from 1. */
export const TYPED_FORMATS = ['bold', 'italic', 'code', 'heading', 'bulletList', 'blockquote'];

/** Pasted numbered lists begin at 1, as they will when stored, instead of showing a number that gets lost. */
export function restartLists(pastedHtml: string): string {
  return pastedHtml.replace(/<ol\b[^>]*>/gi, '<ol>');
}

/**
 * The editor's document model: what a note may hold and nothing else. A change that would make the note one the diary
 * could not show again is refused where it happens, and `onTooMuch` is told, so that no words are written in vain.
 */
export function noteExtensions(onTooMuch: () => void): Extensions {
  return [
    StarterKit.configure({
      heading: { levels: [2, 3] },
      codeBlock: false,
      strike: false,
      underline: false,
      horizontalRule: false,
      dropcursor: false,
      gapcursor: false,
      trailingNode: false,
      link: {
        openOnClick: false,
        defaultProtocol: 'https',
        isAllowedUri: (url) => safeHref(url) !== null,
        HTMLAttributes: { target: null, rel: null, class: null },
      },
    }),
    withinLimits(onTooMuch),
  ];
}

function withinLimits(onTooMuch: () => void) {
  return Extension.create({
    name: 'withinLimits',
    addProseMirrorPlugins: () => [
      new Plugin({
        filterTransaction(transaction) {
          const isKept = !transaction.docChanged || readNote(transaction.doc.toJSON()) !== null;
          if (!isKept) onTooMuch();
          return isKept;
        },
      }),
    ],
  });
}
