import { env } from '@/lib/env';

/**
 * Whether a request was sent by this product's own pages. Browsers say so in Sec-Fetch-Site; one too old for that still
 * sends Origin with everything that is not a GET. Neither header: not a browser page of ours, so no.
 */
export function isSameOrigin(headers: Headers): boolean {
  const site = headers.get('sec-fetch-site');
  if (site) return site === 'same-origin';
  return headers.get('origin') === env().APP_URL;
}
