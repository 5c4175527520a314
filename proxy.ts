import { randomBytes } from 'node:crypto';
import { NextResponse, type NextRequest } from 'next/server';

/** Sets what the browser may do with every page. Rights are decided in db/, never here. */
export function proxy(request: NextRequest) {
  const nonce = randomBytes(16).toString('base64');
  const policy = contentSecurityPolicy(nonce);
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('content-security-policy', policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('Content-Security-Policy', policy);
  return response;
}

function contentSecurityPolicy(nonce: string): string {
  const store = new URL(process.env.S3_ENDPOINT ?? 'http://127.0.0.1:4568').origin;
  const isDevelopment = process.env.NODE_ENV === 'development';
  return [
    `default-src 'none'`,
    `script-src 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? " 'unsafe-eval'" : ''}`,
    `style-src 'self' 'nonce-${nonce}'`,
    `img-src 'self' blob: data: ${store}`,
    `connect-src 'self' ${store}`,
    `font-src 'self'`,
    `manifest-src 'self'`,
    `object-src 'none'`,
    `base-uri 'none'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
  ].join('; ');
}

export const config = { matcher: ['/((?!_next/static/|icon.svg).*)'] };
