import { describe, expect, test } from 'vitest';
import { listAccessEvents, listAuditEvents } from '@/db/queries/audit';
import { listBuildsByNumber, recordVisit, requireBuild } from '@/db/queries/builds';
import { editEntry, postEntry, releaseEntry, requireEditableEntry, withdrawEntry } from '@/db/queries/entries';
import { listMailProblems } from '@/db/queries/outbox';
import {
  addCompanion,
  assignStaff,
  holdBuild,
  invitePerson,
  listPeople,
  removeCompanion,
  stepIn,
} from '@/db/queries/people';
import { grantPhoto } from '@/db/queries/photos';
import { listBuildQuestions } from '@/db/queries/question-lists';
import { askQuestion, writeLetter } from '@/db/queries/questions';
import { Denied, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import {
  entryFor,
  makeBuild,
  makeEntry,
  makePerson,
  makeQuestion,
  noteOf,
  NOW_MS,
  openShop,
  type TestBuild,
} from '../support/world';

await openTestDatabase();
await openShop();

/** A build with one of everybody who reaches it. */
async function openScene() {
  const people = {
    owner: await makePerson('buyer'),
    companion: await makePerson('buyer'),
    builder: await makePerson('builder'),
    rep: await makePerson('rep'),
    admin: await makePerson('admin'),
  };
  const staff = [
    { person: people.builder },
    { person: people.rep },
    { person: people.admin, stepInReason: 'Asked to' },
  ];
  const { owner, companion } = people;
  return { people, build: await makeBuild({ owner, companions: [companion], staff }) };
}

type Scene = Awaited<ReturnType<typeof openScene>>;
type Open = (viewer: Viewer, scene: { people: Scene['people']; build: TestBuild }) => Promise<unknown>;

const letter = () => ({ note: noteOf('Thank you.'), idempotencyKey: `letter-${Math.random()}` });
const edit = { revision: 1, note: noteOf('Rewritten.') };
const photo = { label: '', contentType: 'image/png' as const, sizeBytes: 9, sha256: 'A'.repeat(43) + '=' };

const author = () => makePerson('builder');
const entryOfAnother = async ({ build }: { build: TestBuild }) => makeEntry(build, await author());
const heldEntry = async ({ build }: { build: TestBuild }) => makeEntry(build, await author(), { state: 'held' });

const staff = 'builder, rep, admin';
const doors: { name: string; by: string; open: Open }[] = [
  {
    name: 'reads the build',
    by: 'owner, companion, builder, rep, admin',
    open: (v, { build }) => requireBuild(v, build.orderNumber),
  },
  {
    name: 'marks a visit',
    by: 'owner, companion, builder, rep, admin',
    open: (v, { build }) => recordVisit(v, build.orderNumber, NOW_MS),
  },
  { name: 'posts an entry', by: staff, open: (v, { build }) => postEntry(v, entryFor(build), NOW_MS) },
  {
    name: 'edits an entry of their own',
    by: staff,
    open: async (v, { build }) => editEntry(v, await makeEntry(build, v), edit, NOW_MS),
  },
  {
    name: 'edits the entry of another',
    by: 'rep, admin',
    open: async (v, scene) => editEntry(v, await entryOfAnother(scene), edit, NOW_MS),
  },
  {
    name: 'opens the entry of another for editing',
    by: 'rep, admin',
    open: async (v, scene) => requireEditableEntry(v, await entryOfAnother(scene)),
  },
  {
    name: 'withdraws the entry of another',
    by: 'rep, admin',
    open: async (v, scene) => withdrawEntry(v, await entryOfAnother(scene), NOW_MS),
  },
  {
    name: 'releases an entry',
    by: 'rep, admin',
    open: async (v, scene) => releaseEntry(v, await heldEntry(scene), NOW_MS),
  },
  {
    name: 'uploads a photo',
    by: staff,
    open: (v, { build }) => grantPhoto(v, build.orderNumber, { uploadKey: v.id, ...photo }, NOW_MS),
  },
  {
    name: 'lists the questions',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => listBuildQuestions(v, build.orderNumber, null),
  },
  {
    name: 'asks a question',
    by: 'owner',
    open: (v, { build: { orderNumber } }) =>
      askQuestion(v, { orderNumber, entryId: null, topicId: 'shipping', subject: 'When', ...letter() }, NOW_MS),
  },
  {
    name: 'writes a letter where nobody holds the pen',
    by: 'owner, rep, admin',
    open: async (v, { build, people }) => writeLetter(v, await makeQuestion(build, people.owner), letter(), NOW_MS),
  },
  {
    name: 'writes a letter holding the pen',
    by: 'owner, builder, rep, admin',
    open: async (v, { build, people }) =>
      writeLetter(v, await makeQuestion(build, people.owner, { penHolder: v }), letter(), NOW_MS),
  },
  {
    name: 'writes a letter about money, holding the pen',
    by: 'owner, rep, admin',
    open: async (v, { build, people }) =>
      writeLetter(v, await makeQuestion(build, people.owner, { penHolder: v, topicId: 'money' }), letter(), NOW_MS),
  },
  {
    name: 'reads who was let on',
    by: 'owner, rep, admin',
    open: (v, { build }) => listAccessEvents(v, build.orderNumber),
  },
  {
    name: 'holds the build from view',
    by: 'rep, admin',
    open: (v, { build }) => holdBuild(v, build.orderNumber, NOW_MS, NOW_MS),
  },
  {
    name: 'adds a companion',
    by: 'owner',
    open: async (v, { build }) =>
      addCompanion(v, build.orderNumber, { name: 'A Friend', email: `${v.id.toLowerCase()}@people.example` }, NOW_MS),
  },
  {
    name: 'removes a companion',
    by: 'owner',
    open: (v, { build, people }) => removeCompanion(v, build.orderNumber, people.companion.id, NOW_MS),
  },
  { name: 'lists people', by: 'admin', open: (v) => listPeople(v, '') },
  { name: 'lists builds by number', by: 'admin', open: (v) => listBuildsByNumber(v, '') },
  { name: 'reads the audit log', by: 'admin', open: (v) => listAuditEvents(v, 1) },
  { name: 'watches the mail', by: 'admin', open: (v) => listMailProblems(v) },
  {
    name: 'steps in',
    by: 'admin',
    open: (v, { build }) => stepIn(v, { orderNumber: build.orderNumber, reason: 'Asked to' }, NOW_MS),
  },
  {
    name: 'assigns staff',
    by: 'admin',
    open: (v, { build, people }) =>
      assignStaff(v, { userId: people.builder.id, orderNumbers: [build.orderNumber], cleared: false }, NOW_MS),
  },
  {
    name: 'invites somebody',
    by: 'admin',
    open: (v) =>
      invitePerson(
        v,
        {
          name: 'New',
          email: `new-${v.id.toLowerCase()}@people.example`,
          role: 'buyer',
          department: null,
          orderNumber: '',
        },
        NOW_MS,
      ),
  },
];

describe('on a build that all of them reach', () => {
  test.each(doors)('who $name: exactly $by', async ({ by, open }) => {
    const allowed: string[] = [];
    for (const who of ['owner', 'companion', 'builder', 'rep', 'admin'] as const) {
      const scene = await openScene();
      try {
        await open(scene.people[who], scene);
        allowed.push(who);
      } catch (error) {
        if (!(error instanceof Denied || error instanceof OutOfReach)) throw error;
      }
    }
    expect(allowed.join(', ')).toBe(by);
  });

  test('an owner cannot learn from a refusal that an entry waits for release', async () => {
    const scene = await openScene();
    const held = await heldEntry(scene);
    await expect(releaseEntry(scene.people.owner, held, NOW_MS)).rejects.toThrow(OutOfReach);
  });
});
