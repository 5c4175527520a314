'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useEffect, useRef } from 'react';
import { currentHref } from './current-href';

export type SubLink = { href: string; label: string };

type SubNavProps = {
  /** What the pages have in common: "Access", or the instrument whose they are. */
  label: string;
  links: SubLink[];
  /** On a phone this row then stands in for the main one, which the top bar leaves out, and leads back to it. */
  back?: SubLink;
};

/** Pages that belong together, side by side. */
export function SubNav({ label, links, back }: SubNavProps) {
  const current = currentHref(
    usePathname(),
    links.map(({ href }) => href),
  );
  const row = useRef<HTMLUListElement>(null);
  useEffect(() => {
    // On a phone the row scrolls: the page one is on must not be out of it.
    row.current?.querySelector('[aria-current]')?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }, [current]);
  return (
    <nav
      aria-label={label}
      data-sub-nav={back ? 'alone' : 'below'}
      className="border-b border-line bg-sheet print:hidden"
    >
      <ul ref={row} role="list" className="relative mx-auto flex max-w-[82rem] gap-1 overflow-x-auto px-2 md:px-10">
        {back && (
          <li className="md:hidden">
            <Link href={back.href} className="flex min-h-11 items-center px-3 whitespace-nowrap text-soft">
              {back.label}
            </Link>
          </li>
        )}
        {links.map(({ href, label: words }) => (
          <li key={href} className="md:first:-ml-3">
            <Link
              href={href}
              aria-current={href === current ? 'page' : undefined}
              className="flex min-h-11 items-center border-b-[3px] border-transparent px-3 whitespace-nowrap text-soft -outline-offset-2 aria-[current]:border-finish-deep aria-[current]:font-semibold aria-[current]:text-ink"
            >
              {words}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
