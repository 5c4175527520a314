import { NOW_MS, type TestBuild } from './world';
import { write } from '@/db/client';
import * as tables from '@/db/schema';
import { newId } from '@/db/schema/columns';
import type { SpecDocument } from '@/lib/specs/document';
import type { Viewer } from '@/lib/viewer';

type SignedWish = { number?: number; state?: 'asked' | 'signed' };

/** A version of a build's spec that its owner has signed, unless told otherwise. @returns the sign-off's id */
export async function makeVersion(
  build: TestBuild,
  { rep, owner }: { rep: Viewer; owner: Viewer },
  document: SpecDocument,
  { number = 1, state = 'signed' }: SignedWish = {},
): Promise<string> {
  const [specVersionId, signOffId] = [newId(), newId()];
  const contentHash = specVersionId.padEnd(64, '0');
  await write(async (tx) => {
    const version = { id: specVersionId, buildId: build.id, number, document, contentHash };
    await tx.insert(tables.specVersions).values({ ...version, sentById: rep.id, sentAt: NOW_MS });
    const asked = { kind: 'spec', title: `Version ${number} of the spec`, dueOn: '2026-12-20', contentHash } as const;
    const answer = state === 'signed' ? { answeredById: owner.id, answeredAt: NOW_MS, signedName: owner.name } : {};
    await tx.insert(tables.signOffs).values({
      ...asked,
      ...answer,
      id: signOffId,
      buildId: build.id,
      specVersionId,
      state,
      askedById: rep.id,
      askedAt: NOW_MS,
    });
  });
  return signOffId;
}

/** A measured length in inches, carried by an entry, for one item of the spec. */
export async function makeMeasured(build: TestBuild, entryId: string, itemKey: string, text: string): Promise<void> {
  const value = { kind: 'measure', name: itemKey, measured: { text, unit: 'in' } } as const;
  await write((tx) => tx.insert(tables.readings).values({ buildId: build.id, entryId, position: 0, value, itemKey }));
}
