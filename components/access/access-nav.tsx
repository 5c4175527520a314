'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { currentHref } from '@/components/shell/current-href';

/** Pages that belong together, side by side. */
export function AccessNav({ label = 'Access', links }: { label?: string; links: { href: string; label: string }[] }) {
  const current = currentHref(
    usePathname(),
    links.map(({ href }) => href),
  );
  return (
    <nav aria-label={label} className="border-b border-line bg-sheet print:hidden">
      <ul role="list" className="mx-auto flex relative max-w-[82rem] gap-1 overflow-x-auto px-2 md:px-10">
        {links.map(({ href, label }) => (
          <li key={href} className="md:first:-ml-3">
            <Link
              href={href}
              aria-current={href === current ? 'page' : undefined}
              className="flex min-h-11 items-center border-b-[3px] border-transparent px-3 text-soft -outline-offset-2 aria-[current]:border-finish-deep aria-[current]:font-semibold aria-[current]:text-ink"
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
