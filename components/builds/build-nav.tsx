'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { currentHref } from '@/components/shell/current-href';

type BuildNavProps = {
  links: { href: string; label: string }[];
  instrument: string;
  /** On a phone this row stands in for the main one, which the top bar then leaves out. */
  isAlone: boolean;
};

/** The pages of one build. */
export function BuildNav({ links, instrument, isAlone }: BuildNavProps) {
  const current = currentHref(
    usePathname(),
    links.map(({ href }) => href),
  );
  return (
    <nav
      aria-label={instrument}
      data-build-nav={isAlone ? 'alone' : 'below'}
      className="border-b border-line bg-sheet print:hidden"
    >
      <ul role="list" className="mx-auto flex relative max-w-[82rem] gap-1 overflow-x-auto px-2 md:px-10">
        {isAlone && (
          <li className="md:hidden">
            <Link href="/builds" className="flex min-h-11 items-center px-3 whitespace-nowrap text-soft">
              Your builds
            </Link>
          </li>
        )}
        {links.map(({ href, label }) => (
          <li key={href} className="md:first:-ml-3">
            <Link
              href={href}
              aria-current={href === current ? 'page' : undefined}
              className="flex min-h-11 items-center border-b-[3px] border-transparent px-3 whitespace-nowrap text-soft aria-[current]:border-finish-deep aria-[current]:font-semibold aria-[current]:text-ink"
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
