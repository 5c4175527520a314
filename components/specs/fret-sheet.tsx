import { clsx } from 'clsx';
import type { Fingerboard } from '@/lib/craft/fingerboard';
import type { FretSheet as Sheet, SheetPage } from '@/lib/craft/fret-sheet';
import { sheetLines } from '@/lib/craft/fret-words';
import { CheckRulers } from './check-rulers';
import { SheetBoard } from './sheet-board';

type SheetProps = {
  sheet: Sheet;
  board: Fingerboard;
  /** What the sheet belongs to, such as the order number and the version of the spec. */
  title: string;
};

const paperClasses = { A4: 'sheet-a4', Letter: 'sheet-letter' } as const;

/** The board at full size on as many pages as it needs, black on white in any theme. On the screen the pages shrink to fit. */
export function FretSheet({ sheet, board, title }: SheetProps) {
  return (
    <div className="grid gap-6">
      {sheet.pages.map((page) => (
        <Page key={page.number} sheet={sheet} board={board} page={page} title={title} />
      ))}
    </div>
  );
}

function Page({ sheet, board, page, title }: SheetProps & { page: SheetPage }) {
  const lines = sheetLines(sheet, page, board.table);
  return (
    <svg
      role="img"
      aria-label={`${title}. ${lines.join(' ')}`}
      width={`${sheet.widthMm}mm`}
      height={`${sheet.heightMm}mm`}
      viewBox={`0 0 ${sheet.widthMm} ${sheet.heightMm}`}
      className={clsx('print-sheet block h-auto max-w-full print:h-auto print:max-w-none', paperClasses[sheet.paper])}
    >
      <rect width="100%" height="100%" fill="white" />
      <text x={sheet.marginMm} y={sheet.marginMm + 4} fontSize="4.5" fontWeight="600" fill="black">
        {title}
      </text>
      {lines.map((line, i) => (
        <text key={line} x={sheet.marginMm} y={sheet.marginMm + 9.5 + i * 4.5} fontSize="3.2" fill="black">
          {line}
        </text>
      ))}
      <SheetBoard sheet={sheet} board={board} page={page} />
      <CheckRulers sheet={sheet} />
    </svg>
  );
}
