import { clsx } from 'clsx';
import type { Caution } from '@/lib/craft/cautions';

/**
 * What has to be minded, beside the work or the part of the spec it belongs to. One stands open; several fold under their
 * names, so that the page stays calm and nothing is hidden from a search.
 */
export function Cautions({ cautions, className }: { cautions: readonly Caution[]; className?: string }) {
  const [first, ...others] = cautions;
  if (!first) return null;
  const frame = clsx('rounded border border-edge bg-sheet', className);
  if (others.length === 0) {
    return (
      <div role="note" aria-label={`Mind: ${first.title}`} className={clsx(frame, 'flex gap-3 px-4 py-3')}>
        <MindIcon />
        <CautionText caution={first} />
      </div>
    );
  }
  return (
    <details className={clsx(frame, 'group')}>
      <summary className="flex min-h-12 items-center gap-3 px-4 py-3">
        <MindIcon />
        <span className="flex-1">
          <span className="font-semibold">Mind: </span>
          {listWords(cautions)}
        </span>
        <span aria-hidden="true" className="text-soft transition-transform group-open:rotate-90">
          ›
        </span>
      </summary>
      <ul className="grid gap-4 border-t border-line px-4 py-3">
        {cautions.map((caution) => (
          <li key={caution.key}>
            <CautionText caution={caution} />
          </li>
        ))}
      </ul>
    </details>
  );
}

function CautionText({ caution }: { caution: Caution }) {
  return (
    <div className="max-w-[62ch]">
      <p className="font-semibold">{caution.title}</p>
      <p className="text-soft">{caution.text}</p>
    </div>
  );
}

function MindIcon() {
  return (
    <svg
      viewBox="0 0 20 20"
      aria-hidden="true"
      focusable="false"
      className="mt-0.5 size-5 flex-none text-brass-deep"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.6"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      <path d="M10 2.5 18 17H2Z" />
      <path d="M10 8v4M10 14.4v.1" />
    </svg>
  );
}

/** "Finish solvents, isocyanates in two-part finishes and spray room" */
function listWords(cautions: readonly Caution[]): string {
  const titles = cautions.map(({ title }, index) => (index === 0 ? title : lowerFirst(title)));
  return `${titles.slice(0, -1).join(', ')} and ${titles.at(-1) ?? ''}`;
}

const lowerFirst = (text: string) => text.charAt(0).toLowerCase() + text.slice(1);
