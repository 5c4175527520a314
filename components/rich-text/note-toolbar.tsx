'use client';

import { clsx } from 'clsx';
import { useEditorState, type Editor } from '@tiptap/react';
import { useRef, useState } from 'react';
import { FORMAT_CONTROLS, Sign } from './format-controls';

const STEPS: Record<string, (now: number, last: number) => number> = {
  ArrowRight: (now, last) => (now === last ? 0 : now + 1),
  ArrowLeft: (now, last) => (now === 0 ? last : now - 1),
  Home: () => 0,
  End: (_now, last) => last,
};

/** The format buttons of a note: one stop for the tab key, arrow keys between them. */
export function NoteToolbar(props: { editor: Editor; disabled: boolean; linkIsOpen: boolean; onLink: () => void }) {
  const { editor, disabled, linkIsOpen, onLink } = props;
  const [current, setCurrent] = useState(0);
  const bar = useRef<HTMLDivElement>(null);
  const isOn = useEditorState({ editor, selector: ({ editor }) => activeFormats(editor) });

  function step(event: React.KeyboardEvent) {
    const next = STEPS[event.key]?.(current, FORMAT_CONTROLS.length);
    if (next === undefined) return;
    event.preventDefault();
    setCurrent(next);
    bar.current?.querySelectorAll('button')[next]?.focus();
  }

  const shared = (index: number) => ({
    disabled,
    tabIndex: index === current ? 0 : -1,
    onFocus: () => setCurrent(index),
  });
  return (
    <div ref={bar} role="toolbar" aria-label="Format" onKeyDown={step} className="flex flex-wrap">
      {FORMAT_CONTROLS.map((control, i) => (
        <ToolButton
          key={control.name}
          label={control.label}
          pressed={isOn[control.name] ?? false}
          onClick={() => control.toggle(editor)}
          {...shared(i)}
        >
          {control.sign}
        </ToolButton>
      ))}
      <ToolButton
        label="Link"
        pressed={isOn.link ?? false}
        expanded={linkIsOpen}
        onClick={onLink}
        {...shared(FORMAT_CONTROLS.length)}
      >
        <Sign path="M10 14a4 4 0 0 0 6 .4l3-3a4 4 0 0 0-5.7-5.7l-1 1M14 10a4 4 0 0 0-6-.4l-3 3a4 4 0 0 0 5.7 5.7l1-1" />
      </ToolButton>
    </div>
  );
}

function activeFormats(editor: Editor): Record<string, boolean> {
  return Object.fromEntries(
    [...FORMAT_CONTROLS.map(({ name }) => name), 'link'].map((name) => [name, editor.isActive(name)]),
  );
}

interface ToolButtonProps {
  label: string;
  pressed: boolean;
  expanded?: boolean;
  disabled: boolean;
  tabIndex: number;
  onClick: () => void;
  onFocus: () => void;
  children: React.ReactNode;
}

function ToolButton({ label, pressed, expanded, children, ...rest }: ToolButtonProps) {
  return (
    <button
      type="button"
      aria-label={label}
      title={label}
      aria-pressed={pressed}
      aria-expanded={expanded}
      onMouseDown={(event) => event.preventDefault()}
      className={clsx(
        'grid size-12 place-items-center rounded focus-visible:outline-2 focus-visible:-outline-offset-2 disabled:opacity-50',
        pressed ? 'bg-finish-deep text-sheet' : 'text-ink enabled:hover:bg-tint',
      )}
      {...rest}
    >
      {children}
    </button>
  );
}
