/** The link a page belongs to: the longest one its path lies under, whole segments only. Null when there is none. */
export function currentHref(pathname: string, hrefs: string[]): string | null {
  const holding = hrefs.filter(
    (href) => pathname === href || pathname.startsWith(href.endsWith('/') ? href : `${href}/`),
  );
  return holding.sort((a, b) => b.length - a.length)[0] ?? null;
}
