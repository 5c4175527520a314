import { describe, expect, test } from 'vitest';
import { write } from '@/db/client';
import { listAccessEvents, listAuditEvents } from '@/db/queries/audit';
import { listBuildsByNumber, recordVisit, requireBuild } from '@/db/queries/builds';
import { listCalibrations } from '@/db/queries/calibration';
import { floorAnswer } from '@/db/queries/floor';
import { moveBuilds } from '@/db/queries/floor-moves';
import { listLoads } from '@/db/queries/load';
import { windowStory } from '@/db/queries/ready-windows';
import {
  addClosure,
  removeClosure,
  requireShopCalendar,
  requireStageSettings,
  saveCapacity,
  saveHolidays,
  saveHours,
  saveShopZone,
  saveStage,
} from '@/db/queries/shop-calendar';
import { listUnreachableOwners } from '@/db/queries/contacts';
import { findStageWords } from '@/db/queries/stage-words';
import { editEntry, postEntry, releaseEntry, requireEditableEntry, withdrawEntry } from '@/db/queries/entries';
import { listMails } from '@/db/queries/mail-watch';
import { assignStaff, stepIn } from '@/db/queries/assignments';
import { addCompanion, removeCompanion } from '@/db/queries/companions';
import { holdBuild } from '@/db/queries/holds';
import { invitePerson, listPeople } from '@/db/queries/people';
import { grantPhoto } from '@/db/queries/photos';
import { askForChange, signSignOff, withdrawSignOff } from '@/db/queries/sign-off-answers';
import { listBuildSignOffs, requireSignOff } from '@/db/queries/sign-offs';
import { grantDocument, listDrawings, requireDocumentFile } from '@/db/queries/documents';
import { listBuildQuestions } from '@/db/queries/question-lists';
import { findBench, listBoards, listReadings } from '@/db/queries/readings';
import { saveAway } from '@/db/queries/away';
import { listMargin, writeMargin } from '@/db/queries/margin';
import { listPenPasses, passPen } from '@/db/queries/pen';
import { listPhrases, savePhrase } from '@/db/queries/phrases';
import { endQuestion, reopenQuestion } from '@/db/queries/question-ends';
import { askQuestion, markRead, writeLetter } from '@/db/queries/questions';
import { findTopicSetUp, saveFallback, saveLead, saveTopic } from '@/db/queries/topics';
import { assignments } from '@/db/schema';
import { requestChange, listChangeRequests } from '@/db/queries/change-requests';
import { findDraft, saveDraft, startDraft } from '@/db/queries/spec-drafts';
import { findShownSpec } from '@/db/queries/spec-shown';
import { listVersions, sendVersion } from '@/db/queries/spec-versions';
import { specTemplates } from '@/db/schema';
import { Denied, OutOfReach } from '@/lib/errors';
import type { Viewer } from '@/lib/viewer';
import { openTestDatabase } from '../support/database';
import { measureItem, smallSpec } from '../support/spec';
import { askDrawing, makeDocument, signedIn } from '../support/sign-off-world';
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
await write((tx) =>
  tx.insert(specTemplates).values({ id: 'small', name: 'Small', document: smallSpec(), position: 1 }),
);

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
const phrase = (whose: 'mine' | 'shop') => ({ phraseId: '', title: 'Soon', words: 'Soon.', whose });
const putOn = (build: TestBuild, userId: string) =>
  write((tx) => tx.insert(assignments).values({ buildId: build.id, userId, startedAt: NOW_MS }));
const edit = { revision: 1, note: noteOf('Rewritten.') };
const photo = { label: '', contentType: 'image/png' as const, sizeBytes: 9, sha256: 'A'.repeat(43) + '=' };

const file = { label: 'Logo', sizeBytes: 9, sha256: 'A'.repeat(43) + '=' };

const monday = { weekday: 1, opensAtMin: 480, closesAtMin: 1020 };
const estimate = { bestDays: 3, likelyDays: 5, worstDays: 9, minimumWaitDays: 0, silenceDays: 14 };

const author = () => makePerson('builder');
const entryOfAnother = async ({ build }: { build: TestBuild }) => makeEntry(build, await author());
const heldEntry = async ({ build }: { build: TestBuild }) => makeEntry(build, await author(), { state: 'held' });

/** A spec whose one item is frozen from the stage that the build is in. */
const frozenSpec = smallSpec(measureItem({ key: 'body', frozenFrom: 'wood' }));

async function sentVersion(sender: Viewer, { build, people }: { build: TestBuild; people: Scene['people'] }) {
  const { orderNumber } = build;
  await startDraft(people.builder, orderNumber, 'small', NOW_MS);
  await saveDraft(people.builder, { orderNumber, revision: 1, document: frozenSpec }, NOW_MS);
  const sending = { orderNumber, revision: 2, message: '', dueOn: '2026-12-20', blocksStageKey: null };
  return sendVersion(sender, sending, NOW_MS);
}

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
    name: 'reads what was measured',
    by: 'owner, companion, builder, rep, admin',
    open: (v, { build }) => listReadings(v, build.orderNumber),
  },
  {
    name: 'reads how its boards move',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => listBoards(v, build.orderNumber),
  },
  {
    name: 'is told of an owner whom mail does not reach',
    by: 'rep, admin',
    open: (v, { build }) => listUnreachableOwners(v, build.orderNumber),
  },
  { name: 'opens the bench', by: staff, open: (v, { build }) => findBench(v, build.orderNumber) },
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
    by: 'owner, builder, rep, admin',
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
    name: 'lists the sign-offs',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => listBuildSignOffs(v, build.orderNumber),
  },
  {
    name: 'opens a sign-off',
    by: 'owner, builder, rep, admin',
    open: async (v, { build, people }) => requireSignOff(v, await askDrawing(build, people.rep)),
  },
  {
    name: 'opens a drawing that was sent to be signed',
    by: 'owner, builder, rep, admin',
    open: async (v, { build, people }) => {
      const documentId = await makeDocument(build, people.rep);
      await askDrawing(build, people.rep, { documentId });
      return requireDocumentFile(v, documentId);
    },
  },
  {
    name: 'opens a drawing that nobody was asked to sign',
    by: 'builder, rep, admin',
    open: async (v, { build, people }) => requireDocumentFile(v, await makeDocument(build, people.rep)),
  },
  { name: 'asks for a signature', by: 'rep, admin', open: (v, { build }) => askDrawing(build, v) },
  {
    name: 'sends up a drawing',
    by: 'rep, admin',
    open: (v, { build: { orderNumber } }) => grantDocument(v, { orderNumber, uploadKey: v.id, ...file }, NOW_MS),
  },
  {
    name: 'signs',
    by: 'owner',
    open: async (v, { build, people }) =>
      signSignOff(await signedIn(v), { signOffId: await askDrawing(build, people.rep), name: v.name }, NOW_MS),
  },
  {
    name: 'asks for a change instead of signing',
    by: 'owner',
    open: async (v, { build, people }) =>
      askForChange(await signedIn(v), { signOffId: await askDrawing(build, people.rep), words: 'Wider' }, NOW_MS),
  },
  {
    name: 'takes back what was to be signed',
    by: 'rep, admin',
    open: async (v, { build, people }) => withdrawSignOff(v, await askDrawing(build, people.rep), NOW_MS),
  },
  {
    name: 'reads the margin',
    by: staff,
    open: async (v, { build, people }) => listMargin(v, await makeQuestion(build, people.owner)),
  },
  {
    name: 'reads the margin of a question about money',
    by: 'rep, admin',
    open: async (v, { build, people }) => listMargin(v, await makeQuestion(build, people.owner, { topicId: 'money' })),
  },
  {
    name: 'writes in the margin',
    by: staff,
    open: async (v, { build, people }) => writeMargin(v, await makeQuestion(build, people.owner), letter(), NOW_MS),
  },
  {
    name: 'reads how the pen went',
    by: staff,
    open: async (v, { build, people }) => listPenPasses(v, await makeQuestion(build, people.owner)),
  },
  {
    name: 'passes a pen that another holds',
    by: 'rep, admin',
    open: async (v, { build, people }) => {
      const [holder, next] = [await makePerson('builder'), await makePerson('builder')];
      for (const { id: userId } of [holder, next]) await putOn(build, userId);
      const questionId = await makeQuestion(build, people.owner, { penHolder: holder });
      return passPen(v, questionId, { toId: next.id, reason: 'Asked to' }, NOW_MS);
    },
  },
  {
    name: 'closes a question',
    by: 'owner, rep, admin',
    open: async (v, { build, people }) =>
      endQuestion(v, await makeQuestion(build, people.owner), 'no_answer_needed', NOW_MS),
  },
  {
    name: 'opens a closed question again',
    by: 'owner, rep, admin',
    open: async (v, { build, people }) => reopenQuestion(v, await makeQuestion(build, people.owner), NOW_MS),
  },
  {
    name: 'marks a question as read',
    by: 'owner, builder, rep, admin',
    open: async (v, { build, people }) => markRead(v, await makeQuestion(build, people.owner), NOW_MS),
  },
  { name: 'keeps phrases', by: staff, open: (v) => savePhrase(v, phrase('mine')) },
  { name: 'reads phrases', by: staff, open: (v) => listPhrases(v) },
  { name: 'is out of office', by: staff, open: (v) => saveAway(v, { fromAt: null, untilAt: null }, NOW_MS) },
  { name: 'sets up the topics', by: 'admin', open: (v) => findTopicSetUp(v) },
  { name: 'names a lead', by: 'admin', open: (v) => saveLead(v, 'neck', '') },
  { name: 'names who answers the rest', by: 'admin', open: (v) => saveFallback(v, '') },
  {
    name: 'changes a topic',
    by: 'admin',
    open: (v) => saveTopic(v, { topicId: 'shipping', name: 'Shipping', answers: 'rep', dueHours: 8 }, NOW_MS),
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
  {
    name: 'reads the spec that was sent',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => Promise.all([findShownSpec(v, build.orderNumber), listVersions(v, build.orderNumber)]),
  },
  {
    name: 'reads the change requests',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => listChangeRequests(v, build.orderNumber),
  },
  {
    name: 'lists the drawings of the build',
    by: 'owner, builder, rep, admin',
    open: (v, { build }) => listDrawings(v, build.orderNumber),
  },
  { name: 'reads the draft of the spec', by: staff, open: (v, { build }) => findDraft(v, build.orderNumber) },
  {
    name: 'starts a spec',
    by: staff,
    open: (v, { build }) => startDraft(v, build.orderNumber, 'small', NOW_MS),
  },
  {
    name: 'saves the draft of the spec',
    by: staff,
    open: async (v, { build, people }) => {
      await startDraft(people.builder, build.orderNumber, 'small', NOW_MS);
      return saveDraft(v, { orderNumber: build.orderNumber, revision: 1, document: smallSpec() }, NOW_MS);
    },
  },
  {
    name: 'sends a version of the spec',
    by: 'rep, admin',
    open: (v, scene) => sentVersion(v, scene),
  },
  {
    name: 'asks for a change of what is frozen',
    by: 'owner',
    open: async (v, scene) => {
      await sentVersion(scene.people.rep, scene);
      return requestChange(v, { orderNumber: scene.build.orderNumber, itemKey: 'body', wish: 'Thinner.' }, NOW_MS);
    },
  },
  { name: 'reads the floor', by: staff, open: (v) => floorAnswer(v, null, NOW_MS) },
  { name: 'reads the load of the departments', by: staff, open: (v) => listLoads(v, NOW_MS) },
  { name: 'reads how windows held', by: staff, open: (v) => listCalibrations(v, NOW_MS) },
  {
    name: 'moves the build on the floor',
    by: staff,
    open: async (v, { build: { orderNumber } }) => {
      const moves = [{ orderNumber, toStageKey: 'neck' }];
      const { left } = await moveBuilds(v, { moves, rack: null, reason: null }, NOW_MS);
      expect(left).toEqual([]);
    },
  },
  {
    name: 'reads the ready window',
    by: 'owner, companion, builder, rep, admin',
    open: (v, { build }) => windowStory(v, build.orderNumber),
  },
  {
    name: 'reads what its stage waits for',
    by: 'owner, companion, builder, rep, admin',
    open: (v, { build }) => findStageWords(v, build.orderNumber, NOW_MS),
  },
  { name: 'reads the working calendar', by: 'admin', open: (v) => requireShopCalendar(v, NOW_MS) },
  { name: 'sets the working week', by: 'admin', open: (v) => saveHours(v, [monday], NOW_MS) },
  { name: 'sets the shop’s zone', by: 'admin', open: (v) => saveShopZone(v, 'Europe/Lisbon', NOW_MS) },
  {
    name: 'takes the holidays of a country',
    by: 'admin',
    open: (v) => saveHolidays(v, { country: null, region: null }, [], '2026-01-01', NOW_MS),
  },
  {
    name: 'closes the shop for a day',
    by: 'admin',
    open: (v) =>
      addClosure(v, { startsOn: '2026-12-24', endsOn: '2026-12-24', name: 'Closed', closesAtMin: null }, NOW_MS),
  },
  { name: 'opens it again', by: 'admin', open: (v) => removeClosure(v, 'none', NOW_MS) },
  { name: 'reads how stages are set up', by: 'admin', open: (v) => requireStageSettings(v) },
  {
    name: 'sets up a stage',
    by: 'admin',
    open: (v) => saveStage(v, { routeId: 'solid', stageKey: 'neck', ...estimate }, NOW_MS),
  },
  {
    name: 'says what a department can take',
    by: 'admin',
    open: (v) => saveCapacity(v, { department: 'neck', capacityPerWeek: 4 }, NOW_MS),
  },
  { name: 'lists people', by: 'admin', open: (v) => listPeople(v, '') },
  { name: 'lists builds by number', by: 'admin', open: (v) => listBuildsByNumber(v, '') },
  { name: 'reads the audit log', by: 'admin', open: (v) => listAuditEvents(v, 1) },
  { name: 'watches the mail', by: 'admin', open: (v) => listMails(v, 'trouble') },
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
