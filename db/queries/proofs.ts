import { and, asc, desc, eq, inArray, isNotNull, or, sql } from 'drizzle-orm';
import { touchDiary } from './builds';
import { requireCan } from './standing';
import { db, write, type Db, type Tx } from '../client';
import { correlated } from '../correlated';
import { entryIsVisible } from '../scope';
import {
  builds,
  buildStages,
  changeRequests,
  documents,
  entries,
  materials,
  photos,
  proofs,
  readings,
  signOffs,
  specVersions,
  users,
} from '../schema';
import { BadInput, Denied } from '@/lib/errors';
import { proofLines, type ProofGround, type ProofLine, type SignedConcession } from '@/lib/specs/proof';
import type { SpecDocument } from '@/lib/specs/document';
import type { Viewer } from '@/lib/viewer';

type Reader = Db | Tx;

/** The version that the owner signed last, with its content. */
export type SignedVersion = {
  id: string;
  number: number;
  sentAt: number;
  signedAt: number;
  signedName: string;
  document: SpecDocument;
};

export type ProofSheet = { version: Omit<SignedVersion, 'document'> | null; lines: ProofLine[] };

/** The version of a build that its owner signed last; null while none is signed. No viewer: the caller has asked. */
export async function unscopedSignedVersion(reader: Reader, buildId: string): Promise<SignedVersion | null> {
  const [version] = await reader
    .select({
      id: specVersions.id,
      number: specVersions.number,
      sentAt: specVersions.sentAt,
      signedAt: signOffs.answeredAt,
      signedName: signOffs.signedName,
      document: specVersions.document,
    })
    .from(specVersions)
    .innerJoin(signOffs, and(eq(signOffs.specVersionId, specVersions.id), eq(signOffs.state, 'signed')))
    .where(eq(specVersions.buildId, buildId))
    .orderBy(desc(specVersions.number))
    .limit(1);
  return version
    ? { ...version, signedAt: version.signedAt ?? version.sentAt, signedName: version.signedName ?? '' }
    : null;
}

/**
 * Every item of the version signed last beside what proves it, as this viewer may see that: the client side counts what
 * was published for it, staff everything that stands in the diary. Without a signed version there are no lines.
 * @throws OutOfReach, or Denied for companions
 */
export async function listProofLines(viewer: Viewer, orderNumber: string): Promise<ProofSheet> {
  const build = await requireCan(viewer, 'spec.read', orderNumber);
  return readProofSheet(db(), viewer, build.id);
}

/** The same inside a transaction, for a build the viewer is known to reach. */
export async function readProofSheet(reader: Reader, viewer: Viewer, buildId: string): Promise<ProofSheet> {
  const signed = await unscopedSignedVersion(reader, buildId);
  if (!signed) return { version: null, lines: [] };
  const { document, ...version } = signed;
  const [taken, linked, asked, papers, woods] = await Promise.all([
    readingsOf(reader, viewer, buildId),
    linksOf(reader, viewer, buildId),
    signOffsOf(reader, buildId),
    documentsOf(reader, buildId),
    reader.select({ key: materials.key, name: materials.name }).from(materials),
  ]);
  const ground: ProofGround = {
    readings: taken.map(asForOwner),
    links: linked.map(asForOwner),
    concessions: asked.flatMap(asConcession),
    openSignOffs: asked.filter(({ state }) => state !== 'signed'),
    documents: papers.map((paper) => ({ ...paper, isSigned: Boolean(paper.isSigned) })),
    materials: Object.fromEntries(woods.map(({ key, name }) => [key, name])),
  };
  return { version, lines: proofLines(document, ground) };
}

const firstPhoto = sql<
  string | null
>`(select ${photos.id} from ${photos} where ${photos.entryId} = ${entries.id} and ${photos.state} = 'ready' order by ${photos.position} limit 1)`;

const shown = {
  entryId: entries.id,
  datedAt: entries.datedAt,
  stageName: buildStages.name,
  authorName: users.name,
  photoId: firstPhoto,
  isForOwner: sql<number>`${entries.state} = 'published' and ${entries.audience} = 'buyer'`,
};

const asForOwner = <T extends { isForOwner: number }>(row: T) => ({ ...row, isForOwner: Boolean(row.isForOwner) });

async function readingsOf(reader: Reader, viewer: Viewer, buildId: string) {
  const rows = await reader
    .select({ ...shown, itemKey: readings.itemKey, value: readings.value })
    .from(readings)
    .innerJoin(entries, eq(entries.id, readings.entryId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(readings.buildId, buildId), isNotNull(readings.itemKey), entryIsVisible(viewer)))
    .orderBy(asc(entries.datedAt), asc(entries.id), asc(readings.position));
  return rows.flatMap(({ itemKey, ...row }) => (itemKey === null ? [] : [{ ...row, itemKey }]));
}

function linksOf(reader: Reader, viewer: Viewer, buildId: string) {
  return reader
    .select({ ...shown, itemKey: proofs.itemKey })
    .from(proofs)
    .innerJoin(entries, eq(entries.id, proofs.entryId))
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .innerJoin(users, eq(users.id, entries.authorId))
    .where(and(eq(proofs.buildId, buildId), entryIsVisible(viewer)));
}

/** What still waits for the owner, and the concessions they signed, oldest first. */
function signOffsOf(reader: Reader, buildId: string) {
  const waits = inArray(signOffs.state, ['asked', 'change_asked']);
  const conceded = and(eq(signOffs.kind, 'concession'), eq(signOffs.state, 'signed'));
  return reader
    .select({
      title: signOffs.title,
      state: signOffs.state,
      kind: signOffs.kind,
      itemKey: sql<string | null>`coalesce(${signOffs.itemKey}, ${changeRequests.itemKey})`,
      documentId: signOffs.documentId,
      concession: signOffs.concession,
      signedName: signOffs.signedName,
      signedAt: signOffs.answeredAt,
    })
    .from(signOffs)
    .leftJoin(changeRequests, eq(changeRequests.id, signOffs.changeRequestId))
    .where(and(eq(signOffs.buildId, buildId), or(waits, conceded)))
    .orderBy(asc(signOffs.askedAt));
}

type AskedRow = Awaited<ReturnType<typeof signOffsOf>>[number];

function asConcession({ state, itemKey, concession, signedName, signedAt }: AskedRow): SignedConcession[] {
  if (state !== 'signed' || itemKey === null || !concession || signedName === null || signedAt === null) return [];
  return [{ ...concession, itemKey, signedName, signedAt }];
}

function documentsOf(reader: Reader, buildId: string) {
  const isSigned = sql<number>`exists (select 1 from ${signOffs} where ${signOffs.documentId} = ${documents.id} and ${signOffs.state} = 'signed')`;
  return reader
    .select({ id: documents.id, title: documents.title, isSigned: correlated(isSigned) })
    .from(documents)
    .where(and(eq(documents.buildId, buildId), eq(documents.state, 'ready')));
}

export type ProofLink = { orderNumber: string; itemKey: string; entryId: string };

/**
 * Says that an entry shows an item as built. Linking twice is linking once.
 * @throws OutOfReach, Denied, or BadInput for an item that is not in the signed version or an entry that is not on this build
 */
export function linkProof(viewer: Viewer, { orderNumber, itemKey, entryId }: ProofLink, nowMs: number): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'proof.link', orderNumber, tx);
    const signed = await unscopedSignedVersion(tx, build.id);
    const item = signed?.document.items.find(({ key }) => key === itemKey);
    if (!item)
      throw new BadInput({ itemKey: 'That item is not in the version the owner signed. Choose one from the list.' });
    const [entry] = await tx
      .select({ id: entries.id })
      .from(entries)
      .where(and(eq(entries.id, entryId), eq(entries.buildId, build.id), entryIsVisible(viewer)));
    if (!entry) throw new BadInput({ entryId: 'That entry is not in this diary any more. Choose another.' });
    await tx
      .insert(proofs)
      .values({ buildId: build.id, itemKey, label: item.label, entryId, createdById: viewer.id, createdAt: nowMs })
      .onConflictDoNothing();
    await touchDiary(tx, build.id);
  });
}

/** Takes a link away again. @throws Denied 'conflict' once the final check has passed on it */
export function unlinkProof(viewer: Viewer, { orderNumber, itemKey, entryId }: ProofLink): Promise<void> {
  return write(async (tx) => {
    const build = await requireCan(viewer, 'proof.link', orderNumber, tx);
    const [row] = await tx.select({ readyAt: builds.readyAt }).from(builds).where(eq(builds.id, build.id));
    if (row?.readyAt != null)
      throw new Denied(
        'conflict',
        'The final check has passed on this proof, so it stays. Link a better entry beside it.',
      );
    await tx
      .delete(proofs)
      .where(and(eq(proofs.buildId, build.id), eq(proofs.itemKey, itemKey), eq(proofs.entryId, entryId)));
    await touchDiary(tx, build.id);
  });
}

/** The entries that could show an item, newest first, for the form that links one. */
export async function listLinkableEntries(viewer: Viewer, orderNumber: string) {
  const build = await requireCan(viewer, 'proof.link', orderNumber);
  return db()
    .select({
      id: entries.id,
      datedAt: entries.datedAt,
      stageKey: buildStages.key,
      stageName: buildStages.name,
      audience: entries.audience,
      words: sql<string>`substr(${entries.bodyText}, 1, 60)`,
    })
    .from(entries)
    .innerJoin(buildStages, eq(buildStages.id, entries.stageId))
    .where(and(eq(entries.buildId, build.id), entryIsVisible(viewer)))
    .orderBy(desc(entries.datedAt))
    .limit(120);
}

export type LinkableEntry = Awaited<ReturnType<typeof listLinkableEntries>>[number];
