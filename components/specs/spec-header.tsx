import type { ReactNode } from 'react';
import { UnitSwitch } from './unit-frame';

type Count = { value: string; label: string; isLate?: boolean };

type SpecHeaderProps = {
  /** "Order Q-2417 · version 4, signed 2 June" */
  over: string;
  title: string;
  counts: Count[];
  actions?: ReactNode;
  /** The fingerboard. */
  children?: ReactNode;
};

/** What this is, how far it is proven, and the board it is about. */
export function SpecHeader({ over, title, counts, actions, children }: SpecHeaderProps) {
  return (
    <header className="border-b border-line bg-sheet">
      <div className="mx-auto grid max-w-[82rem] gap-7 px-4.5 pt-6 pb-6 md:px-10 md:pt-9">
        <div className="flex flex-wrap items-end justify-between gap-x-10 gap-y-5">
          <div>
            <p className="narrow text-sm font-semibold text-soft">{over}</p>
            <h1 className="mt-1 text-3xl md:text-4xl">{title}</h1>
          </div>
          {counts.length > 0 && (
            <dl className="flex flex-wrap gap-x-7 gap-y-3">
              {counts.map(({ value, label, isLate }) => (
                <div key={label} className="flex flex-col-reverse">
                  <dt className={isLate ? 'text-late' : 'text-soft'}>{label}</dt>
                  <dd className="heading text-2xl">{value}</dd>
                </div>
              ))}
            </dl>
          )}
        </div>
        <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
          <UnitSwitch className="w-52" />
          {actions}
        </div>
        {children}
      </div>
    </header>
  );
}
