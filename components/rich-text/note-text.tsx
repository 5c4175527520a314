import { clsx } from 'clsx';
import { Fragment } from 'react';
import type { NoteBlock, NoteInline, NoteListItem, NoteWords } from '@/lib/rich-text/doc';
import { linkRuns, runWords, type LinkRun } from '@/lib/rich-text/link-runs';
import { shownHost } from '@/lib/rich-text/links';
import { readNote } from '@/lib/rich-text/read';
import { NOTE_PLACEHOLDER } from '@/lib/rich-text/refusal';

/**
 * A stored note as text to read. Total: anything may be passed as `doc`; what cannot be read becomes a quiet sentence.
 * Every element, class and attribute is written here; from the note come text and checked addresses, never markup.
 * @param appUrlHost links to this host are not followed by their host in brackets
 */
export function NoteText({ doc, appUrlHost, className }: { doc: unknown; appUrlHost?: string; className?: string }) {
  const note = readNote(doc);
  if (!note) return <p className={clsx('font-sans text-soft', className)}>{NOTE_PLACEHOLDER}</p>;
  return (
    <div
      className={clsx(
        'max-w-[62ch] space-y-3 font-read text-[1.125rem] leading-[1.6] text-pretty wrap-anywhere',
        className,
      )}
      dir="auto"
    >
      <Blocks blocks={note.content} appUrlHost={appUrlHost} />
    </div>
  );
}

function Blocks({ blocks, appUrlHost }: { blocks: readonly NoteBlock[]; appUrlHost?: string }) {
  return blocks.map((block, i) => <Block key={i} block={block} appUrlHost={appUrlHost} />);
}

function Block({ block, appUrlHost }: { block: NoteBlock; appUrlHost?: string }) {
  switch (block.type) {
    case 'paragraph':
      return <p className="whitespace-pre-wrap">{inline(block.content, appUrlHost)}</p>;
    case 'heading':
      return <Heading level={block.attrs.level}>{inline(block.content, appUrlHost)}</Heading>;
    case 'bulletList':
      return <ul className="list-disc space-y-1 ps-6">{items(block.content, appUrlHost)}</ul>;
    case 'orderedList':
      return <ol className="list-decimal space-y-1 ps-6">{items(block.content, appUrlHost)}</ol>;
    case 'blockquote':
      return (
        <blockquote className="space-y-3 border-s-2 border-line ps-4 text-soft">
          <Blocks blocks={block.content} appUrlHost={appUrlHost} />
        </blockquote>
      );
  }
}

function Heading({ level, children }: { level: 2 | 3; children: React.ReactNode }) {
  if (level === 2) return <h3 className="pt-2 text-xl leading-snug font-semibold whitespace-pre-wrap">{children}</h3>;
  return <h4 className="pt-1 leading-snug font-semibold whitespace-pre-wrap">{children}</h4>;
}

function items(content: readonly NoteListItem[], appUrlHost?: string) {
  return content.map((item, i) => (
    <li key={i}>
      <Blocks blocks={item.content} appUrlHost={appUrlHost} />
    </li>
  ));
}

function inline(content: readonly NoteInline[] = [], appUrlHost?: string) {
  return linkRuns(content).map((run, i) => <Run key={i} run={run} appUrlHost={appUrlHost} />);
}

function Run({ run, appUrlHost }: { run: LinkRun; appUrlHost?: string }) {
  const inner = run.parts.map((part, i) => (
    <Fragment key={i}>{part.type === 'text' ? <Words words={part} /> : <br />}</Fragment>
  ));
  if (run.href === null) return inner;
  const host = shownHost(run.href, runWords(run), appUrlHost);
  return (
    <>
      <a
        href={run.href}
        target="_blank"
        rel="noopener nofollow ugc"
        className="text-finish-deep underline underline-offset-2"
      >
        {inner}
      </a>
      {host !== null && (
        <>
          {' ('}
          <bdi>{host}</bdi>)
        </>
      )}
    </>
  );
}

function Words({ words }: { words: NoteWords }) {
  return (words.marks ?? []).reduce<React.ReactNode>((inner, mark) => {
    switch (mark.type) {
      case 'bold':
        return <strong>{inner}</strong>;
      case 'italic':
        return <em>{inner}</em>;
      case 'code':
        return <code className="rounded-sm bg-tint px-1 font-mono text-[0.9em]">{inner}</code>;
      case 'link':
        return inner;
    }
  }, words.text);
}
