import 'server-only';
import { z } from 'zod';
import { noteRefusal, requireRoom, requireViewer } from '@/lib/auth/door';
import { isSameOrigin } from '@/lib/auth/origin';
import { BadInput, Denied, OutOfReach } from '@/lib/errors';
import { logFault } from '@/lib/log';
import type { LimitName } from '@/lib/rate-limits';
import { fieldSentences, refusalOf } from '@/lib/refusal';
import type { SessionViewer } from '@/db/queries/sessions';

export const MAX_BODY_BYTES = 512 * 1024;

type Params = Record<string, string>;
type Context = { params: Promise<Params> };
type Handler = (request: Request, context: Context) => Promise<Response>;
type Run<Input> = (call: {
  viewer: SessionViewer;
  input: Input;
  params: Params;
  request: Request;
}) => Promise<Response | object>;

const privateHeaders = { 'Cache-Control': 'private, no-store', 'X-Content-Type-Options': 'nosniff' };

/** A JSON answer that no shared or private cache may keep. */
export function json(body: unknown, init: ResponseInit = {}): Response {
  return Response.json(body, { ...init, headers: { ...privateHeaders, ...init.headers } });
}

/** A door that reads: signed in, then the query decides. */
export function readRoute(run: Run<undefined>): Handler {
  return (request, context) =>
    answer(context, async (params) => run({ viewer: await requireViewer(), input: undefined, params, request }));
}

/** A door that changes something: own pages only, JSON only, size counted, input checked, limit taken. */
export function writeRoute<S extends z.ZodType>(schema: S, limit: LimitName, run: Run<z.output<S>>): Handler {
  return (request, context) =>
    answer(context, async (params) => {
      requireOwnPage(request);
      const viewer = await requireViewer();
      const input = schema.safeParse(await readJson(request));
      if (!input.success) throw new BadInput(fieldSentences(input.error.issues));
      await requireRoom(limit, viewer.id);
      return run({ viewer, input: input.data, params, request });
    });
}

async function answer({ params }: Context, run: (params: Params) => Promise<Response | object>): Promise<Response> {
  try {
    const result = await run(await params);
    return result instanceof Response ? result : json(result);
  } catch (error) {
    if (error instanceof OutOfReach) await noteRefusal(error);
    return refusal(error);
  }
}

function refusal(error: unknown): Response {
  const known = refusalOf(error);
  if (!known) logFault(error);
  const { status, retryAfterSeconds, ...body } = known ?? {
    status: 500,
    message: 'Something broke on our side. It has been written down; please try again.',
  };
  return json(body, { status, headers: retryAfterSeconds ? { 'Retry-After': String(retryAfterSeconds) } : {} });
}

export function requireOwnPage(request: Request) {
  if (!isSameOrigin(request.headers))
    throw new Denied('not_allowed', 'This can only be sent from the diary’s own pages.');
}

/** The request's JSON, at most MAX_BODY_BYTES of it, counted as it arrives. */
export async function readJson(request: Request): Promise<unknown> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\b/i.test(type)) throw new Denied('bad_request', 'This door reads JSON only.');
  const text = await readText(request);
  try {
    return JSON.parse(text);
  } catch {
    throw new Denied('bad_request', 'What arrived was cut off or garbled. Please send it again.');
  }
}

async function readText(request: Request): Promise<string> {
  const tooLarge = new Denied('too_large', 'That is too long to keep. Shorten it, or split it into two entries.');
  if (Number(request.headers.get('content-length') ?? 0) > MAX_BODY_BYTES) throw tooLarge;
  const chunks: Uint8Array[] = [];
  let sizeBytes = 0;
  for await (const chunk of request.body ?? []) {
    sizeBytes += chunk.byteLength;
    if (sizeBytes > MAX_BODY_BYTES) throw tooLarge;
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString('utf8');
}
