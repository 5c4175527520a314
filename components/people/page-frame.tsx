import type { ReactNode } from 'react';
import { SectionHeading } from '@/components/ui/section-heading';

type PageFrameProps = { title: ReactNode; over?: ReactNode; intro?: ReactNode; tools?: ReactNode; children: ReactNode };

/** A page of settings: what it is, what it is for, and beside it what can be done. `over` is the line above its title. */
export function PageFrame({ title, over, intro, tools, children }: PageFrameProps) {
  return (
    <div className="mx-auto grid max-w-[82rem] grid-cols-[minmax(0,1fr)] gap-8 px-4.5 py-8 md:px-10 md:py-10">
      <div>
        {over && <p className="mb-1 text-sm font-semibold text-soft">{over}</p>}
        <h1 className="text-3xl break-words">{title}</h1>
        {intro && <div className="mt-2 max-w-2xl text-soft">{intro}</div>}
      </div>
      {tools ? (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-x-14 gap-y-12 lg:grid-cols-[minmax(0,1fr)_21rem]">
          <div className="grid min-w-0 content-start gap-10">{children}</div>
          <div className="grid min-w-0 content-start gap-10">{tools}</div>
        </div>
      ) : (
        children
      )}
    </div>
  );
}

/** A part of such a page under its rule. */
export function PageSection({ id, title, children }: { id?: string; title: string; children: ReactNode }) {
  return (
    <section id={id} aria-label={title} className="grid min-w-0 content-start gap-4">
      <SectionHeading>{title}</SectionHeading>
      {children}
    </section>
  );
}
