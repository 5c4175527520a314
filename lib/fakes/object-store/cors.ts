import type { IncomingMessage } from 'node:http';

const METHODS = ['GET', 'HEAD', 'PUT'];
const EXPOSED = 'ETag, Content-Length, x-amz-checksum-sha256, x-amz-checksum-crc32';
const PREFLIGHT_LIFE_S = 600;

function isAllowed(request: IncomingMessage, allowedOrigins: readonly string[]): boolean {
  const { origin } = request.headers;
  return origin !== undefined && allowedOrigins.includes(origin);
}

/** The headers every answer carries; a stranger's origin gets none that let it read. */
export function corsHeaders(request: IncomingMessage, allowedOrigins: readonly string[]): Record<string, string> {
  const vary = { vary: 'Origin, Access-Control-Request-Method, Access-Control-Request-Headers' };
  if (!isAllowed(request, allowedOrigins)) return vary;
  return {
    ...vary,
    'access-control-allow-origin': request.headers.origin ?? '',
    'access-control-expose-headers': EXPOSED,
  };
}

/** What a preflight is told beyond that; undefined when it is refused. */
export function preflightHeaders(
  request: IncomingMessage,
  allowedOrigins: readonly string[],
): Record<string, string> | undefined {
  const method = request.headers['access-control-request-method'];
  if (!isAllowed(request, allowedOrigins) || method === undefined || !METHODS.includes(method)) return undefined;
  const asked = request.headers['access-control-request-headers'];
  return {
    'access-control-allow-methods': METHODS.join(', '),
    'access-control-max-age': String(PREFLIGHT_LIFE_S),
    ...(asked === undefined ? {} : { 'access-control-allow-headers': asked }),
  };
}
