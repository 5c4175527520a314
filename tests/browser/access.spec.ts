import { createClient } from '@libsql/client';
import { expect, request, test, type APIRequestContext } from '@playwright/test';
import { plainNote } from '@/lib/rich-text/plain-text';
import { accessTable, kinds, type Kind } from './access-table';
import { actionId, allDoors } from './doors';
import { people } from './people';
import { tokenFor } from './tokens';
import { world } from './world';

const ORDER = 'Q-2417';
const sameOrigin = { 'sec-fetch-site': 'same-origin', origin: world.appUrl };

const addresses: Record<Kind, string | null> = {
  anon: null,
  owner: people.buyer,
  otherBuyer: people.otherBuyer,
  artist: people.artist,
  companion: people.companion,
  builder: people.builder,
  offBuilder: people.unassignedBuilder,
  rep: people.rep,
  offRep: people.otherRep,
  admin: people.admin,
  ended: 'ended',
};

const openAs = (address: string | null) =>
  request.newContext({
    baseURL: world.appUrl,
    extraHTTPHeaders: address ? { cookie: `flitchbook-session=${tokenFor(address)}` } : {},
  });

/** Rows of the world that the doors are knocked on with; read beside the running app, never written. */
async function readWorld() {
  const db = createClient({ url: `file:${world.dataDir}/flitchbook.db` });
  const one = async (sql: string, ...args: string[]) => String((await db.execute({ sql, args })).rows[0]?.[0] ?? '');
  const found = {
    entryId: await one(
      `select e.id from entries e join builds b on b.id = e.build_id join users u on u.id = e.author_id where b.order_number = ? and u.email = ? and e.audience = 'buyer' limit 1`,
      ORDER,
      people.builder,
    ),
    photoId: await one(
      `select p.id from photos p join entries e on e.id = p.entry_id join builds b on b.id = e.build_id where b.order_number = ? and e.audience = 'buyer' limit 1`,
      ORDER,
    ),
    stageId: await one(
      `select s.id from build_stages s join builds b on b.id = s.build_id where b.order_number = ? limit 1`,
      ORDER,
    ),
    companionId: await one('select id from users where email = ?', people.companion),
    someoneElse: await one(`select id from users where name = 'Leif Ivarsson'`),
    builderId: await one('select id from users where email = ?', people.unassignedBuilder),
    failedMailId: await one(`select id from outbox where state = 'failed' limit 1`),
    assignmentId: await one(
      `select a.id from assignments a join builds b on b.id = a.build_id where b.order_number = 'Q-2430' and a.ended_at is null limit 1`,
    ),
  };
  db.close();
  return found;
}

type Ids = Awaited<ReturnType<typeof readWorld>> & {
  questionId: string;
  ownEntryId: string;
  otherEntryId: string;
  grantedPhotoId: string;
};

let ids: Ids;
let count = 0;
let knocking: Kind = 'anon';
const key = () => `access-${Date.now()}-${count++}-key`;
const note = (text: string) => plainNote(text);
const photo = () => ({
  uploadKey: key(),
  label: 'a.jpg',
  contentType: 'image/jpeg',
  sizeBytes: 10,
  sha256: `${'A'.repeat(43)}=`,
});
const entry = () => ({
  orderNumber: ORDER,
  idempotencyKey: key(),
  stageId: ids.stageId,
  startStage: false,
  audience: 'shop',
  note: note('A line.'),
  photos: [],
});
const question = () => ({
  orderNumber: ORDER,
  entryId: null,
  topicId: 'finish',
  subject: 'How is it?',
  note: note('Tell me.'),
  idempotencyKey: key(),
});

async function post(as: APIRequestContext, path: string, data: object): Promise<Record<string, string>> {
  const answer = await as.post(path, { data, headers: sameOrigin });
  expect(answer.ok(), `${path} ${await answer.text()}`).toBe(true);
  return answer.json();
}

test.beforeAll(async () => {
  ids = { ...(await readWorld()), questionId: '', ownEntryId: '', otherEntryId: '', grantedPhotoId: '' };
  const builder = await openAs(people.builder);
  const owner = await openAs(people.buyer);
  ids.ownEntryId = (await post(builder, '/api/entries', { ...entry(), audience: 'buyer' })).id ?? '';
  ids.otherEntryId = (await post(builder, '/api/entries', { ...entry(), audience: 'buyer' })).id ?? '';
  ids.grantedPhotoId = (await post(builder, `/api/builds/${ORDER}/photos`, photo())).id ?? '';
  ids.questionId = (await post(owner, '/api/questions', question())).id ?? '';
});

/** Leaves the build as the tests after these expect it: open to view, its companion looking on. */
test.afterAll(async () => {
  await callAction(await openAs(people.rep), 'action /builds/[orderNumber]/people#openToView');
  const companion = { orderNumber: ORDER, name: 'Felix Oyelaran', email: people.companion };
  await callAction(await openAs(people.buyer), 'action /builds/[orderNumber]/people#letLookOn', sameOrigin, companion);
});

function pathOf(door: string): string {
  const [, route = ''] = /^\S+ ([^#]+)/.exec(door) ?? [];
  const photoId = door.startsWith('GET') ? ids.photoId : ids.grantedPhotoId;
  return route
    .replace('[orderNumber]', ORDER)
    .replace('[entryId]', ids.ownEntryId)
    .replace('[questionId]', ids.questionId)
    .replace('[photoId]', photoId)
    .replace('[widthPx]', '640')
    .replace('[userId]', ids.someoneElse)
    .replace('[token]', 'no-token-of-ours')
    .replace('[...nextauth]', 'session');
}

const nextYear = `${new Date().getFullYear() + 1}-06-01`;

/** What is sent through each door that takes something. */
function bodyOf(door: string): Record<string, unknown> {
  const person = { name: 'Nell Ashby', email: `nell${count++}@clients.example` };
  const bodies: Record<string, Record<string, unknown>> = {
    'POST /api/builds/[orderNumber]/photos': photo(),
    'POST /api/entries': entry(),
    'PATCH /api/entries/[entryId]': { revision: 1, note: note('Better so.') },
    'POST /api/questions': question(),
    'POST /api/questions/[questionId]/letters': { note: note('A letter.'), idempotencyKey: key() },
    'POST /api/time-zone': { zone: 'Europe/Lisbon' },
    'action /access#invite': { ...person, role: 'buyer', department: '', orderNumber: '' },
    'action /access#assign': { userId: ids.builderId, orderNumbers: 'Q-2431' },
    'action /access#takeOff': { assignmentId: ids.assignmentId },
    'action /access/builds/[orderNumber]#stepIn': { orderNumber: 'Q-2420', reason: 'Looking into a complaint' },
    'action /access/mail#retry': { mailId: ids.failedMailId },
    'action /access/people/[userId]#change': { userId: ids.someoneElse, role: 'artist', department: '' },
    'action /access/people/[userId]#endSessions': { userId: ids.someoneElse },
    'action /access/people/[userId]#close': { userId: ids.someoneElse },
    'action /access/people/[userId]#reopen': { userId: ids.someoneElse },
    'action /builds/[orderNumber]#withdraw': { entryId: knocking === 'rep' ? ids.otherEntryId : ids.ownEntryId },
    'action /builds/[orderNumber]#release': { entryId: ids.entryId },
    'action /builds/[orderNumber]/people#letLookOn': { orderNumber: ORDER, ...person },
    'action /builds/[orderNumber]/people#stopLookingOn': { orderNumber: ORDER, userId: ids.companionId },
    'action /builds/[orderNumber]/people#hold': { orderNumber: ORDER, until: nextYear },
    'action /builds/[orderNumber]/people#openToView': { orderNumber: ORDER },
    'action /me#saveMail': { zone: 'Europe/Lisbon', cadence: 'weekly', hourLocal: '17', weekday: '5' },
    'action /me#saveZone': { zone: 'Europe/Lisbon' },
    'action /sign-in#ask': { address: 'nobody@clients.example' },
    'action /unsubscribe/[token]#stopDiaryMail': { token: 'no-token-of-ours' },
  };
  return bodies[door] ?? {};
}

/** A form's call as React sends it: the previous state and the form's fields. */
function callAction(
  as: APIRequestContext,
  door: string,
  headers: Record<string, string> = sameOrigin,
  body = bodyOf(door),
) {
  const multipart = new FormData();
  for (const [name, value] of Object.entries(body)) multipart.append(`_1_${name}`, String(value));
  multipart.append('0', JSON.stringify([{ state: 'fresh' }, '$K1']));
  return as.post(pathOf(door), { headers: { ...headers, 'next-action': actionId(door) }, multipart, maxRedirects: 0 });
}

async function markOfAction(as: APIRequestContext, door: string): Promise<string> {
  const text = await (await callAction(as, door)).text();
  const [, refusal] = /"state":"refused","message":"([^"]*)"/.exec(text) ?? [];
  if (refusal?.startsWith('You are signed out.')) return '>';
  if (refusal === 'There is nothing here for you.') return '-';
  return refusal === 'Your place on this build does not allow that.' ? 'x' : '+';
}

async function markOf(as: APIRequestContext, door: string): Promise<string> {
  if (door.startsWith('action ')) return markOfAction(as, door);
  const [method = ''] = door.split(' ');
  const isPage = method === 'page';
  const reads = isPage || method === 'GET';
  const answer = await as.fetch(pathOf(door), {
    method: isPage ? 'GET' : method,
    maxRedirects: 0,
    ...(reads ? {} : { data: bodyOf(door), headers: sameOrigin }),
  });
  const status = answer.status();
  if (status === 401 || (status === 307 && answer.headers().location === '/sign-in')) return '>';
  if (status === 404) return '-';
  if (status === 403) return 'x';
  expect(status, `${door} ${await answer.text()}`).toBeLessThan(500);
  return '+';
}

test('every page, route method and action that exists has its row, and no row is left over', () => {
  expect(Object.keys(accessTable).sort()).toEqual([...allDoors].sort());
});

/** Rows that change what later rows rest on come last. */
const late = ['#withdraw', '#stopLookingOn', '#close', '#leaveOthers', '#saveMail', '#reopen', '#hold'];
const lateness = (door: string) => late.findIndex((mark) => door.endsWith(mark));
const rows = Object.entries(accessTable).sort(([a], [b]) => lateness(a) - lateness(b));

for (const [door, marks] of rows) {
  test(`${door} opens to whom the table says`, async () => {
    const seen: Record<string, string> = {};
    const expected: Record<string, string> = {};
    // Those who are turned away knock first: what the others change must not be why.
    const order = [...kinds].sort(
      (a, b) => Number(marks[kinds.indexOf(a)] === '+') - Number(marks[kinds.indexOf(b)] === '+'),
    );
    for (const kind of order) {
      knocking = kind;
      const as = await openAs(addresses[kind]);
      expected[kind] = marks[kinds.indexOf(kind)] ?? '?';
      seen[kind] = await markOf(as, door);
      await as.dispose();
    }
    expect(seen).toEqual(expected);
  });
}

test('nothing that changes anything can be sent from another site, nor by GET', async () => {
  const admin = await openAs(people.admin);
  const builder = await openAs(people.builder);
  const foreign = { 'sec-fetch-site': 'cross-site', origin: 'https://elsewhere.example' };
  for (const door of allDoors.filter((name) => /^(POST|PATCH|DELETE) \/api\/(?!auth|unsubscribe)/.test(name))) {
    const [method = ''] = door.split(' ');
    const answer = await builder.fetch(pathOf(door), { method, data: bodyOf(door), headers: foreign });
    expect(answer.status(), door).toBe(403);
    if (allDoors.includes(door.replace(method, 'GET'))) continue;
    const read = await builder.get(pathOf(door), { maxRedirects: 0 });
    expect([404, 405], `GET ${door}`).toContain(read.status());
  }
  for (const door of allDoors.filter((name) => name.startsWith('action '))) {
    const answer = await callAction(admin, door, foreign);
    expect(answer.status() >= 400 || (await answer.text()).includes('can only be sent'), door).toBe(true);
  }
});

test('a build of others and one that does not exist answer with the same bytes', async () => {
  const stranger = await openAs(people.otherBuyer);
  const [theirs, nobodys] = await Promise.all(
    [ORDER, 'Q-9999'].map((number) => stranger.get(`/api/builds/${number}/diary`)),
  );
  expect(await theirs?.text()).toBe(await nobodys?.text());
  const steady = ({ date: _date, ...headers }: Record<string, string>) => ({
    ...headers,
    'content-security-policy': headers['content-security-policy']?.replace(/nonce-[^']+/g, 'nonce'),
  });
  expect(steady(theirs?.headers() ?? {})).toEqual(steady(nobodys?.headers() ?? {}));
});
