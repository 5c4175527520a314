import 'server-only';
import { cache } from 'react';
import { headers } from 'next/headers';

/** The nonce of this response's content security policy, set by proxy.ts. */
export const pageNonce = async () => (await headers()).get('x-nonce') ?? undefined;

/** The moment of this request, the same wherever its page asks; UTC milliseconds. */
export const requestMs = cache(() => Date.now());
