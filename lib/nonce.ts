import 'server-only';
import { headers } from 'next/headers';

/** The nonce of this response's content security policy, set by proxy.ts. */
export const pageNonce = async () => (await headers()).get('x-nonce') ?? undefined;
