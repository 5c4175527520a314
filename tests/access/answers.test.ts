import { beforeEach, expect, test, vi } from 'vitest';
import { count, eq } from 'drizzle-orm';
import { GET as getSheet } from '@/app/api/builds/[orderNumber]/as-built/pdf/route';
import { POST as postLine } from '@/app/api/builds/[orderNumber]/checks/[runId]/route';
import { GET as getDiary } from '@/app/api/builds/[orderNumber]/diary/route';
import { POST as visit } from '@/app/api/builds/[orderNumber]/visits/route';
import { PATCH as patchEntry } from '@/app/api/entries/[entryId]/route';
import { POST as postLetter } from '@/app/api/questions/[questionId]/letters/route';
import { GET as getPhoto } from '@/app/api/photos/[photoId]/[widthPx]/route';
import { POST as finishPhoto } from '@/app/api/photos/[photoId]/route';
import { GET as getDocument, POST as finishDocument } from '@/app/api/documents/[documentId]/route';
import { db } from '@/db/client';
import { auditEvents } from '@/db/schema';
import { newId } from '@/db/schema/columns';
import { openTestDatabase } from '../support/database';
import { makeDocument } from '../support/sign-off-world';
import {
  makeBuild,
  makeEntry,
  makePerson,
  makePhoto,
  makeQuestion,
  makeSession,
  noteOf,
  openShop,
} from '../support/world';

await openTestDatabase();
await openShop();

const request = vi.hoisted(() => ({ cookie: '', afterwards: new Array<() => unknown>() }));
vi.mock('next/headers', () => ({ cookies: async () => ({ get: () => ({ value: request.cookie }) }) }));
vi.mock('next/server', () => ({ after: (work: () => unknown) => void request.afterwards.push(work) }));
beforeEach(() => request.afterwards.splice(0));

type Handler = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;

async function answerOf(handler: Handler, params: Record<string, string>, body?: object) {
  const headers = { origin: 'https://diary.example', 'content-type': 'application/json' };
  const init = body ? { method: 'POST', headers, body: JSON.stringify(body) } : {};
  const answer = await handler(new Request('https://diary.example/api', init), { params: Promise.resolve(params) });
  return { status: answer.status, headers: [...answer.headers], body: await answer.text() };
}

async function openForeign() {
  const [owner, author] = [await makePerson('buyer'), await makePerson('builder')];
  const build = await makeBuild({ owner, staff: [{ person: author }] });
  const entryId = await makeEntry(build, author);
  const photoId = await makePhoto(build, author, { entryId });
  const documentId = await makeDocument(build, author);
  return { build, entryId, documentId, photoId, questionId: await makeQuestion(build, owner) };
}

const note = noteOf('Rewritten.').doc;
const doors = [
  { name: 'reading a diary', handler: getDiary, id: 'orderNumber' },
  { name: 'marking a visit', handler: visit, id: 'orderNumber', body: {} },
  { name: 'fetching the as-built sheet', handler: getSheet, id: 'orderNumber' },
  {
    name: 'marking a line of a check',
    handler: postLine,
    id: 'orderNumber',
    body: { lineId: 'line', mark: 'pass', note: '', photoId: null },
  },
  { name: 'editing an entry', handler: patchEntry, id: 'entryId', body: { revision: 1, note } },
  {
    name: 'writing a letter',
    handler: postLetter,
    id: 'questionId',
    body: { note, idempotencyKey: 'a-letter-sent-once' },
  },
  { name: 'looking at a photo', handler: getPhoto, id: 'photoId' },
  { name: 'opening a drawing', handler: getDocument, id: 'documentId' },
  { name: 'finishing a drawing', handler: finishDocument, id: 'documentId', body: {} },
  { name: 'finishing an upload', handler: finishPhoto, id: 'photoId', body: {} },
] as const;

// PRODUCT.md, 4.7: no answer tells whether the thing exists.
test.each(doors)('$name answers byte for byte the same for a foreign and an unknown one', async (door) => {
  const { build, ...ids } = await openForeign();
  request.cookie = await makeSession((await makePerson('buyer')).id);
  const foreign = door.id === 'orderNumber' ? build.orderNumber : ids[door.id];
  const body = 'body' in door ? door.body : undefined;
  const answer = await answerOf(door.handler, { [door.id]: foreign, widthPx: '640' }, body);
  expect(answer).toMatchObject({ status: 404, body: '{"message":"There is nothing here for you."}' });
  expect(await answerOf(door.handler, { [door.id]: newId(), widthPx: '640' }, body)).toEqual(answer);
});

test.each(doors)('$name without a session is refused before anything is looked up', async (door) => {
  const { build, ...ids } = await openForeign();
  request.cookie = 'no-such-session';
  const foreign = door.id === 'orderNumber' ? build.orderNumber : ids[door.id];
  const body = 'body' in door ? door.body : undefined;
  const answer = await answerOf(door.handler, { [door.id]: foreign }, body);
  expect(answer.status).toBe(401);
  expect(await answerOf(door.handler, { [door.id]: newId() }, body)).toEqual(answer);
});

test('a refusal of a known build is written down, but only after the answer has gone out', async () => {
  const { build } = await openForeign();
  const stranger = await makePerson('buyer');
  request.cookie = await makeSession(stranger.id);
  const refusals = () => db().select({ n: count() }).from(auditEvents).where(eq(auditEvents.buildId, build.id));
  await answerOf(getDiary, { orderNumber: build.orderNumber });
  expect(await refusals()).toEqual([{ n: 0 }]);
  for (const work of request.afterwards) await work();
  expect(await refusals()).toEqual([{ n: 1 }]);
});
