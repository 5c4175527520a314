import { isIP } from 'node:net';
import { env } from '@/lib/env';

/**
 * Whom to count limits against when nobody is signed in: the address that the one trusted proxy names, IPv6 cut to its
 * /64. Without PEER_ADDRESS_HEADER every peer shares one count, since a header set by strangers proves nothing.
 */
export function peerKey(headers: Headers): string {
  const name = env().PEER_ADDRESS_HEADER;
  const address = name ? (headers.get(name)?.split(',').at(-1)?.trim() ?? '') : '';
  if (isIP(address) === 4) return address;
  if (isIP(address) === 6) return networkOf(address);
  return 'unknown';
}

function networkOf(address: string): string {
  const [head = '', tail = ''] = address.toLowerCase().split('::');
  const groups = head.split(':').filter(Boolean);
  const rest = tail.split(':').filter(Boolean);
  const missing = Math.max(0, 8 - groups.length - rest.length);
  const full = address.includes('::') ? [...groups, ...Array<string>(missing).fill('0'), ...rest] : groups;
  return full
    .slice(0, 4)
    .map((group) => group.padStart(4, '0'))
    .join(':');
}
