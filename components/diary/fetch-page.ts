import type { DiaryPage } from '@/db/queries/diary';

const kept = new Map<string, { etag: string; page: DiaryPage }>();

/** What the server rendered is known already: the first look after it costs a 304. */
export function rememberPage(url: string, etag: string, page: DiaryPage): void {
  kept.set(url, { etag, page });
}

/** One page of a diary; when nothing changed, the very same object as last time. */
export async function fetchPage(url: string): Promise<DiaryPage> {
  const known = kept.get(url);
  const answer = await fetch(url, { headers: known ? { 'If-None-Match': known.etag } : {}, cache: 'no-store' });
  if (answer.status === 304 && known) return known.page;
  if (answer.status === 401) window.location.assign('/sign-in');
  if (!answer.ok) throw new Error(`the diary answered ${answer.status}`);
  const page: DiaryPage = await answer.json();
  kept.set(url, { etag: answer.headers.get('etag') ?? '', page });
  return page;
}
