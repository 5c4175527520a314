import { expect, test } from 'vitest';
import { peerKey } from '@/lib/auth/peer';
import { openTestDatabase } from '../../support/database';

process.env.PEER_ADDRESS_HEADER = 'x-real-ip';
await openTestDatabase();

const keyOf = (address: string) => peerKey(new Headers({ 'x-real-ip': address }));

// SECURITY.md P10: IPv6 is counted by its /64. Addresses of RFC 5737 and RFC 3849.
test.each([
  ['192.0.2.7', '192.0.2.7'],
  ['2001:db8::1', '2001:0db8:0000:0000'],
  ['2001:db8:0:0:ffff::1', '2001:0db8:0000:0000'],
  ['2001:DB8:1:2:3:4:5:6', '2001:0db8:0001:0002'],
  ['2001:db8:1:2::', '2001:0db8:0001:0002'],
  ['::1', '0000:0000:0000:0000'],
  ['198.51.100.1, 192.0.2.9', '192.0.2.9'],
  ['not an address', 'unknown'],
  ['', 'unknown'],
])('%j counts as %s', (address, key) => {
  expect(keyOf(address)).toBe(key);
});

test('a header that the trusted proxy does not write counts for nothing', () => {
  expect(peerKey(new Headers({ 'x-forwarded-for': '192.0.2.1' }))).toBe('unknown');
});
