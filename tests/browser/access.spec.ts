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
    // Signed already: whoever may answer is told so, and nothing changes for the tests after these.
    signOffId: await one(
      `select s.id from sign_offs s join builds b on b.id = s.build_id where b.order_number = ? and s.kind = 'sample' and s.state = 'signed' limit 1`,
      ORDER,
    ),
    documentId: await one(
      `select s.document_id from sign_offs s join builds b on b.id = s.build_id where b.order_number = ? and s.kind = 'drawing' limit 1`,
      ORDER,
    ),
    // Declined already, for the same reason.
    changeId: await one(
      `select c.id from change_requests c join builds b on b.id = c.build_id where b.order_number = ? and c.state = 'declined' limit 1`,
      ORDER,
    ),
    rack: await one('select rack from builds where order_number = ?', ORDER),
    routeId: await one('select route_id from builds where order_number = ?', ORDER),
    nowKey: await one(
      `select s.key from build_stages s join builds b on b.id = s.build_id where b.order_number = ? and s.started_at is not null and s.finished_at is null`,
      ORDER,
    ),
    checkRunId: await one(
      `select r.id from check_runs r join builds b on b.id = r.build_id where b.order_number = ? and r.outcome = 'failed' limit 1`,
      ORDER,
    ),
    checkListId: await one(
      `select l.id from check_lists l join builds b on b.route_id = l.route_id where b.order_number = ? and l.name = 'Before paint'`,
      ORDER,
    ),
    // Lines that no other test walks through.
    checkLineId: await one(`select id from check_lines where text like 'Binding tight%'`),
    otherCheckLineId: await one(`select id from check_lines where text like 'Inside clean%'`),
    lineListId: await one(`select list_id from check_lines where text like 'Binding tight%'`),
    companionId: await one('select id from users where email = ?', people.companion),
    someoneElse: await one(`select id from users where name = 'Leif Ivarsson'`),
    builderId: await one('select id from users where email = ?', people.unassignedBuilder),
    failedMailId: await one(`select id from outbox where state = 'failed' limit 1`),
    droppedMailId: await one(`select id from outbox where state = 'dropped' limit 1`),
    assignmentId: await one(
      `select a.id from assignments a join builds b on b.id = a.build_id where b.order_number = 'Q-2430' and a.ended_at is null limit 1`,
    ),
  };
  db.close();
  return found;
}

type Ids = Awaited<ReturnType<typeof readWorld>> & {
  questionId: string;
  letterId: string;
  ownEntryId: string;
  otherEntryId: string;
  grantedPhotoId: string;
  grantedDocumentId: string;
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
const drawing = () => ({
  orderNumber: ORDER,
  uploadKey: key(),
  label: 'a.pdf',
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

const letter = () => ({ note: note('A letter.'), idempotencyKey: key() });

async function post(as: APIRequestContext, path: string, data: object): Promise<Record<string, string>> {
  const answer = await as.post(path, { data, headers: sameOrigin });
  expect(answer.ok(), `${path} ${await answer.text()}`).toBe(true);
  return answer.json();
}

/** There are no pages here of which a trace could tell. */
test.use({ trace: 'off' });

test.beforeAll(async () => {
  ids = {
    ...(await readWorld()),
    questionId: '',
    letterId: '',
    ownEntryId: '',
    otherEntryId: '',
    grantedPhotoId: '',
    grantedDocumentId: '',
  };
  const builder = await openAs(people.builder);
  const owner = await openAs(people.buyer);
  ids.ownEntryId = (await post(builder, '/api/entries', { ...entry(), audience: 'buyer' })).id ?? '';
  ids.otherEntryId = (await post(builder, '/api/entries', { ...entry(), audience: 'buyer' })).id ?? '';
  ids.grantedPhotoId = (await post(builder, `/api/builds/${ORDER}/photos`, photo())).id ?? '';
  ids.grantedDocumentId = (await post(await openAs(people.rep), '/api/documents', drawing())).id ?? '';
  ids.questionId = (await post(owner, '/api/questions', question())).id ?? '';
  ids.letterId = (await post(owner, `/api/questions/${ids.questionId}/letters`, letter())).id ?? '';
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
    .replace('[runId]', ids.checkRunId)
    .replace('[entryId]', ids.ownEntryId)
    .replace('[questionId]', ids.questionId)
    .replace('[letterId]', ids.letterId)
    .replace('[photoId]', photoId)
    .replace('[documentId]', door.startsWith('GET') ? ids.documentId : ids.grantedDocumentId)
    .replace('[signOffId]', ids.signOffId)
    .replace('[widthPx]', '640')
    .replace('[userId]', ids.someoneElse)
    .replace('[rack]', encodeURIComponent(ids.rack))
    .replace('[token]', 'no-token-of-ours')
    .replace('[...nextauth]', 'session');
}

const nextMonth = new Date(Date.now() + 30 * 86_400_000).toISOString().slice(0, 10);
const stageEstimate = {
  stageKey: 'frets',
  bestDays: '3',
  likelyDays: '5',
  worstDays: '11',
  minimumWaitDays: '0',
  silenceDays: '10',
};
const nextYear = `${new Date().getFullYear() + 1}-06-01`;

/** What is sent through each door that takes something. */
function bodyOf(door: string): Record<string, unknown> {
  const person = { name: 'Nell Ashby', email: `nell${count++}@clients.example` };
  const bodies: Record<string, Record<string, unknown>> = {
    'POST /api/builds/[orderNumber]/photos': photo(),
    'POST /api/documents': drawing(),
    'POST /api/entries': entry(),
    'PATCH /api/entries/[entryId]': { revision: 1, note: note('Better so.') },
    'POST /api/questions': question(),
    'POST /api/questions/[questionId]/letters': letter(),
    'POST /api/questions/[questionId]/letters/[letterId]': letter(),
    'POST /api/questions/[questionId]/letters/[letterId]/send': { idempotencyKey: key() },
    'POST /api/questions/[questionId]/margin': letter(),
    'POST /api/questions/[questionId]/read': {},
    // A stage it is in already: the door opens and nothing moves.
    'POST /api/floor/moves': { moves: [{ orderNumber: ORDER, toStageKey: ids.nowKey }] },
    'POST /api/floor/moves/undo': { moves: [{ orderNumber: ORDER, moveId: 'no-move-of-ours' }] },
    'action /access/calendar#saveWeek': {
      opens1: '07:30',
      closes1: '12:00',
      reopens1: '12:45',
      ends1: '16:30',
      opens5: '07:30',
      closes5: '14:00',
    },
    'action /access/calendar#saveZone': { zone: 'America/New_York' },
    'action /access/calendar#saveCountry': { country: 'US', region: '' },
    'action /access/calendar#close': { name: 'Stocktaking', startsOn: nextYear, endsOn: '', closesAt: '' },
    'action /access/calendar#open': { closureId: 'no-closure-of-ours' },
    'action /access/stages#estimate': { ...stageEstimate, routeId: ids.routeId },
    'action /access/stages#setCapacity': { department: 'finish', capacityPerWeek: '4' },
    'POST /api/time-zone': { zone: 'Europe/Lisbon' },
    'action /access#invite': { ...person, role: 'buyer', department: '', orderNumber: '' },
    'action /access#assign': { userId: ids.builderId, orderNumbers: 'Q-2431' },
    'action /access#takeOff': { assignmentId: ids.assignmentId },
    'action /access/builds/[orderNumber]#stepIn': { orderNumber: 'Q-2420', reason: 'Looking into a complaint' },
    'action /access/mail#retry': { mailId: ids.failedMailId },
    'action /access/mail#sendOnceMore': { mailId: ids.droppedMailId },
    'action /access/mail#reachAgain': { userId: ids.someoneElse },
    'POST /api/builds/[orderNumber]/checks/[runId]': {
      lineId: ids.checkLineId,
      mark: 'pass',
      note: '',
      photoId: null,
    },
    'action /access/checks#addList': { routeId: 'no-route', stageKey: 'finish', name: 'Another list' },
    'action /access/checks#removeList': { listId: 'no-list' },
    'action /access/checks#addLine': { listId: ids.lineListId, text: 'No dust in the pores.' },
    'action /access/checks#changeLine': { lineId: ids.checkLineId, text: 'Edges even.' },
    'action /access/checks#removeLine': { lineId: ids.otherCheckLineId },
    'action /builds/[orderNumber]/checks#start': { orderNumber: ORDER, listId: ids.checkListId },
    'action /builds/[orderNumber]/checks#finish': { orderNumber: ORDER, runId: ids.checkRunId },
    'action /builds/[orderNumber]/checks#tell': { orderNumber: ORDER, runId: ids.checkRunId, words: 'A dent.' },
    'action /builds/[orderNumber]/checks#keep': { orderNumber: ORDER, runId: ids.checkRunId },
    'action /builds/[orderNumber]/final-check#pass': { orderNumber: ORDER },
    'action /builds/[orderNumber]/final-check#ship': { orderNumber: ORDER, carrier: 'Harbour Freight Lines' },
    'action /builds/[orderNumber]/final-check#deliver': { orderNumber: ORDER },
    'action /builds/[orderNumber]/final-check#concede': {
      orderNumber: ORDER,
      itemKey: 'nut_width',
      reason: 'It plays well so.',
      dueOn: nextYear,
    },
    'action /builds/[orderNumber]/final-check#link': {
      orderNumber: ORDER,
      itemKey: 'nut_width',
      entryId: ids.otherEntryId,
    },
    'action /builds/[orderNumber]/final-check#unlink': {
      orderNumber: ORDER,
      itemKey: 'nut_width',
      entryId: ids.otherEntryId,
    },
    'action /access/people/[userId]#change': { userId: ids.someoneElse, role: 'artist', department: '' },
    'action /access/people/[userId]#endSessions': { userId: ids.someoneElse },
    'action /access/people/[userId]#close': { userId: ids.someoneElse },
    'action /access/people/[userId]#reopen': { userId: ids.someoneElse },
    'action /access/topics#keepTopic': { topicId: 'finish', name: 'Finish & colour', answers: 'finish', dueHours: '8' },
    'action /access/topics#nameFallback': { userId: '' },
    'action /access/topics#nameLead': { departmentKey: 'finish', leadId: '' },
    'action /questions/[questionId]#end': { questionId: ids.questionId, how: 'closed' },
    'action /questions/[questionId]#pass': { questionId: ids.questionId, toId: ids.builderId, reason: 'You see it' },
    'action /questions/[questionId]#reopen': { questionId: ids.questionId },
    'action /questions/phrases#drop': { phraseId: 'no-phrase-of-ours' },
    'action /questions/phrases#keep': { title: 'Soon', words: '{owner}, soon.', whose: 'mine' },
    'action /me#keepAway': { from: '', until: '' },
    'action /builds/[orderNumber]#withdraw': { entryId: knocking === 'rep' ? ids.otherEntryId : ids.ownEntryId },
    'action /builds/[orderNumber]#release': { entryId: ids.entryId },
    'action /builds/[orderNumber]/people#letLookOn': { orderNumber: ORDER, ...person },
    'action /builds/[orderNumber]/people#stopLookingOn': { orderNumber: ORDER, userId: ids.companionId },
    'action /builds/[orderNumber]/people#hold': { orderNumber: ORDER, until: nextYear },
    'action /builds/[orderNumber]/people#openToView': { orderNumber: ORDER },
    'action /builds/[orderNumber]/sign-offs/[signOffId]#sign': { signOffId: ids.signOffId, name: 'Maren Oyelaran' },
    'action /builds/[orderNumber]/sign-offs/[signOffId]#askChange': { signOffId: ids.signOffId, words: 'Darker' },
    'action /builds/[orderNumber]/sign-offs/[signOffId]#takeBack': { signOffId: ids.signOffId },
    'action /builds/[orderNumber]/sign-offs/new#send': {
      ...{ orderNumber: ORDER, kind: 'drawing', title: 'Logo', message: '', dueOn: nextMonth },
      ...{ blocksStageKey: '', documentId: 'no-document-of-ours', photoId: '' },
    },
    'action /builds/[orderNumber]/spec#start': { orderNumber: ORDER, templateId: 'no-such-template' },
    'action /builds/[orderNumber]/spec/changes#ask': { orderNumber: ORDER, itemKey: 'no_such_item', wish: 'Wider.' },
    'action /builds/[orderNumber]/spec/changes#decline': { requestId: ids.changeId, answer: 'It is glued.' },
    'action /builds/[orderNumber]/spec/changes#offer': {
      requestId: ids.changeId,
      price: '10',
      extraDays: '1',
      message: '',
      dueOn: nextYear,
    },
    'action /builds/[orderNumber]/spec/edit#save': { orderNumber: ORDER, revision: 1, document: '{"items":[]}' },
    'action /builds/[orderNumber]/spec/edit#send': {
      orderNumber: ORDER,
      revision: 1,
      message: '',
      dueOn: nextYear,
      blocksStageKey: '',
    },
    'action /me#saveMail': { zone: 'Europe/Lisbon', cadence: 'weekly', hourLocal: '17', weekday: '5' },
    'action /me#saveKinds': { letter: 'at_once' },
    'action /me#saveWords': { locale: 'en-GB', units: 'in' },
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
  return /^(Your place on this build does not allow that|Only the owner)/.test(refusal ?? '') ? 'x' : '+';
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
  for (const door of allDoors.filter((name) =>
    /^(POST|PATCH|DELETE) \/api\/(?!auth|unsubscribe|webhooks)/.test(name),
  )) {
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
