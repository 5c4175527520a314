/**
 * How a note looks while it is written: the page's reading type, and the few rules an editable region cannot do without
 * (its own style sheet is not injected, so that a strict style policy holds).
 */
export const WRITING_CLASSES = [
  'relative min-h-40 space-y-3 px-4 py-3 font-read text-[1.125rem] leading-[1.6] text-ink outline-none',
  'whitespace-break-spaces wrap-anywhere [font-variant-ligatures:none]',
  '[&_ul]:list-disc [&_ul]:ps-6 [&_ol]:list-decimal [&_ol]:ps-6 [&_li>*+*]:mt-1',
  '[&_blockquote]:space-y-3 [&_blockquote]:border-s-2 [&_blockquote]:border-line [&_blockquote]:ps-4 [&_blockquote]:text-soft',
  '[&_h2]:text-xl [&_h2]:leading-snug [&_h2]:font-semibold [&_h3]:leading-snug [&_h3]:font-semibold',
  '[&_a]:text-finish-deep [&_a]:underline [&_a]:underline-offset-2',
  '[&_code]:rounded-sm [&_code]:bg-tint [&_code]:px-1 [&_code]:font-mono [&_code]:text-[0.9em]',
  '[&_img.ProseMirror-separator]:m-0! [&_img.ProseMirror-separator]:inline! [&_img.ProseMirror-separator]:size-0!',
].join(' ');
