import 'server-only';
import { after } from 'next/server';
import { notFound, redirect } from 'next/navigation';
import { refuseDoor } from './door';
import { findViewer } from './viewer';
import { Denied, OutOfReach } from '@/lib/errors';
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
    if (error instanceof OutOfReach) after(() => refuseDoor(error));
    if (error instanceof OutOfReach || error instanceof Denied) notFound();
    throw error;
  }
}
