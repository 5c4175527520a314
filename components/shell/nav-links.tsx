'use client';

import { clsx } from 'clsx';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { currentHref } from './current-href';

export type NavLink = { href: string; label: string; count?: number };

export function NavLinks({ links }: { links: NavLink[] }) {
  const pathname = usePathname() ?? '';
  const current = currentHref(
    pathname,
    links.map((link) => link.href),
  );
  return (
    <ul className="flex gap-1">
      {links.map((link) => (
        <li key={link.href}>
          <Link
            href={link.href}
            aria-current={link.href === current ? 'page' : undefined}
            className={clsx(
              'flex h-12 items-center gap-1.5 border-y-[3px] border-transparent px-2.5 whitespace-nowrap -outline-offset-2 md:h-15',
              link.href === current ? 'border-b-night-accent text-on-night' : 'text-on-night-soft hover:text-on-night',
            )}
          >
            {link.label} {link.count !== undefined && link.count > 0 && <Count count={link.count} />}
          </Link>
        </li>
      ))}
    </ul>
  );
}

function Count({ count }: { count: number }) {
  return (
    <span className="narrow flex h-5 min-w-5 items-center justify-center rounded-full bg-brass px-1.5 text-xs font-bold text-black">
      {count}
      <span className="sr-only"> waiting</span>
    </span>
  );
}
