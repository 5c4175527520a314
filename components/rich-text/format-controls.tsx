import type { Editor } from '@tiptap/react';

export interface FormatControl {
  name: 'bold' | 'italic' | 'heading' | 'bulletList' | 'orderedList' | 'blockquote';
  label: string;
  sign: React.ReactNode;
  toggle: (editor: Editor) => boolean;
}

/** What the toolbar offers besides links, in the order it is drawn. */
export const FORMAT_CONTROLS: readonly FormatControl[] = [
  {
    name: 'bold',
    label: 'Bold',
    sign: <span className="text-lg font-bold">B</span>,
    toggle: (editor) => editor.chain().focus().toggleBold().run(),
  },
  {
    name: 'italic',
    label: 'Italic',
    sign: <span className="font-read text-lg italic">i</span>,
    toggle: (editor) => editor.chain().focus().toggleItalic().run(),
  },
  {
    name: 'heading',
    label: 'Heading',
    sign: <span className="text-lg font-semibold">H</span>,
    toggle: (editor) => editor.chain().focus().toggleHeading({ level: 2 }).run(),
  },
  {
    name: 'bulletList',
    label: 'List',
    sign: <Sign path="M9 6h11M9 12h11M9 18h11M4 6h.01M4 12h.01M4 18h.01" />,
    toggle: (editor) => editor.chain().focus().toggleBulletList().run(),
  },
  {
    name: 'orderedList',
    label: 'Numbered list',
    sign: <Sign path="M11 7h9M11 17h9M4 5l1.5-1v6M4 15.5c0-2 3-2 3 0 0 1.5-3 2.5-3 4.5h3" />,
    toggle: (editor) => editor.chain().focus().toggleOrderedList().run(),
  },
  {
    name: 'blockquote',
    label: 'Quote',
    sign: <Sign path="M5 5v14M10 8h10M10 12h10M10 16h6" />,
    toggle: (editor) => editor.chain().focus().toggleBlockquote().run(),
  },
];

/** A line drawing on a 24 by 24 ground. */
export function Sign({ path }: { path: string }) {
  return (
    <svg
      viewBox="0 0 24 24"
      width="24"
      height="24"
      aria-hidden="true"
      fill="none"
      stroke="currentColor"
      strokeWidth="2"
    >
      <path d={path} strokeLinecap="round" strokeLinejoin="round" />
    </svg>
  );
}
