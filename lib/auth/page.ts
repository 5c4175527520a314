import 'server-only';
import { cache } from 'react';
import { notFound, redirect } from 'next/navigation';
import { noteRefusal } from './door';
import { findViewer } from './viewer';
import { Denied, OutOfReach } from '@/lib/errors';
import { requireBuild } from '@/db/queries/builds';
import type { SessionViewer } from '@/db/queries/sessions';

/** The viewer of a page; a signed-out visitor goes to sign in. */
export async function pageViewer(): Promise<SessionViewer> {
  return (await findViewer()) ?? redirect('/sign-in');
}

/** Loads what a page shows; what is out of reach, or not for this viewer, looks as if it did not exist. */
export async function orNotFound<T>(load: Promise<T>): Promise<T> {
  try {
    return await load;
  } catch (error) {
    if (error instanceof OutOfReach) await noteRefusal(error);
    if (error instanceof OutOfReach || error instanceof Denied) notFound();
    throw error;
  }
}

/** The build of a page and who looks at it; asked by its layout and its page, read once. */
export const openBuild = cache(async (orderNumber: string) => {
  const viewer = await pageViewer();
  return { viewer, build: await orNotFound(requireBuild(viewer, orderNumber)) };
});
