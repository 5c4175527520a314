import type { ReactNode } from 'react';
import { Mark } from '@/components/ui/mark';

/** The frame of everything before sign-in: one column, the shop's name, one thing to do. */
export function SignedOutPage({ shopName, title, children }: { shopName: string; title: string; children: ReactNode }) {
  return (
    <div className="mx-auto grid max-w-2xl gap-8 px-5 py-10 md:py-16">
      <p className="flex items-center gap-3 font-semibold">
        <Mark className="h-7 w-9 text-finish-deep" />
        <span>
          Flitchbook <span className="font-normal text-soft">for {shopName}</span>
        </span>
      </p>
      <main id="main" className="grid gap-6">
        <h1 className="text-3xl">{title}</h1>
        {children}
      </main>
    </div>
  );
}
