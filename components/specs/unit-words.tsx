import type { ReactNode } from 'react';
import type { InEachUnit } from '@/lib/specs/shown-unit';

/** One length, said in the unit of the frame around it. What is the same in every unit is written once. */
export function UnitWords({ words }: { words: InEachUnit }) {
  if (words.in === words.mm && words.in === words.fraction) return words.in;
  return (
    <>
      <span className="group-data-[unit=fraction]/unit:hidden group-data-[unit=mm]/unit:hidden">{words.in}</span>
      <span className="hidden group-data-[unit=fraction]/unit:inline">{words.fraction}</span>
      <span className="hidden group-data-[unit=mm]/unit:inline">{words.mm}</span>
    </>
  );
}

/** Something drawn once in inches and once in millimetres. */
export function UnitDrawing({ inches, mm }: { inches: ReactNode; mm: ReactNode }) {
  return (
    <>
      <div className="group-data-[unit=mm]/unit:hidden">{inches}</div>
      <div className="hidden group-data-[unit=mm]/unit:block">{mm}</div>
    </>
  );
}
