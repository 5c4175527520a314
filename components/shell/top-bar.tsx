import Link from 'next/link';
import { Avatar } from '@/components/ui/avatar';
import { Mark } from '@/components/ui/mark';
import { NavLinks, type NavLink } from './nav-links';

type TopBarProps = {
  shopName: string;
  links: NavLink[];
  /** Whose page this is; leads to their own settings. */
  personName: string;
  homeHref?: string;
};

/** The dark bar over every signed-in page. On a phone the links scroll in a row of their own below the name. */
export function TopBar({ shopName, links, personName, homeHref = '/' }: TopBarProps) {
  return (
    <header className="bg-night text-on-night [--finish-deep:var(--night-accent)] print:hidden">
      <SkipLink />
      <div className="mx-auto flex max-w-[90rem] flex-wrap items-center px-4.5 md:px-10">
        <Link href={homeHref} className="flex h-14 items-center gap-3 md:h-15">
          <Mark className="h-6 w-7.5" />
          <span className="text-lg font-semibold [font-stretch:90%]">Flitchbook</span>
        </Link>
        <span className="hidden items-center lg:flex">
          <span aria-hidden="true" className="mx-7 text-on-night-soft">
            /
          </span>
          <span className="text-on-night-soft">{shopName}</span>
        </span>
        <Link
          href="/search"
          className="ml-auto flex size-12 items-center justify-center text-on-night-soft hover:text-on-night md:order-last md:ml-3"
        >
          <SearchSign />
          <span className="sr-only">Search</span>
        </Link>
        <Link href="/me" className="flex h-14 items-center md:order-last md:ml-2">
          <Avatar name={personName} className="[--finish-deep:#00464c] [--tint:#e0f1f2]" />
          <span className="sr-only">{personName}: your settings</span>
        </Link>
        <nav
          aria-label="Main"
          className="max-md:[body:has([data-sub-nav=alone])_&]:hidden -mx-4.5 w-[calc(100%+2.25rem)] overflow-x-auto border-t border-night-line px-2 md:mx-0 md:ml-auto md:w-auto md:border-t-0 md:px-0"
        >
          <NavLinks links={links} />
        </nav>
      </div>
    </header>
  );
}

function SearchSign() {
  return (
    <svg viewBox="0 0 20 20" aria-hidden="true" className="size-5 fill-none stroke-current stroke-[1.75]">
      <circle cx="8.5" cy="8.5" r="5.5" />
      <path d="m12.7 12.7 4.8 4.8" strokeLinecap="round" />
    </svg>
  );
}

/** First thing the Tab key reaches; shown only then. The page's <main> has the id `main`. */
function SkipLink() {
  return (
    <a
      href="#main"
      className="absolute top-2 left-2 z-50 -translate-y-20 rounded bg-sheet px-4 py-2 font-semibold text-ink focus:translate-y-0"
    >
      Go to the page
    </a>
  );
}
