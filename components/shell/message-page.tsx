import type { ReactNode } from 'react';
import { LinkButton } from '@/components/ui/button';
import { Mark } from '@/components/ui/mark';

/** A page that has one thing to say and one way on. */
export function MessagePage({ title, children, action }: { title: string; children: ReactNode; action?: ReactNode }) {
  return (
    <main id="main" className="mx-auto grid min-h-dvh max-w-xl content-center gap-5 px-5 py-16">
      <Mark className="h-8 w-10 text-finish-deep" />
      <h1 className="text-3xl">{title}</h1>
      <p className="text-lg text-soft">{children}</p>
      <div>{action ?? <LinkButton href="/">Go to your page</LinkButton>}</div>
    </main>
  );
}
