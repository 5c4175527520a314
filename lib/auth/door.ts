import 'server-only';
import { after } from 'next/server';
import { findViewer } from './viewer';
import { recordRefusal } from '@/db/queries/audit';
import { takeOne } from '@/db/queries/rate-limits';
import type { SessionViewer } from '@/db/queries/sessions';
import { Denied, type OutOfReach } from '@/lib/errors';
import type { LimitName } from '@/lib/rate-limits';

/** @throws Denied 'signed_out' */
export async function requireViewer(): Promise<SessionViewer> {
  const viewer = await findViewer();
  if (!viewer) throw new Denied('signed_out', 'You are signed out. Sign in again; nothing you wrote here is lost.');
  return viewer;
}

/** @throws Denied 'too_many' when the viewer has used up the limit */
export async function requireRoom(limit: LimitName, who: string): Promise<void> {
  const seconds = await takeOne(limit, who, Date.now());
  if (seconds === 0) return;
  const wait = seconds < 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
  throw new Denied('too_many', `That is more than we take at once. Please try again in ${wait}.`, seconds);
}

/** Has a refusal written down after the answer has gone out, so that the time it took tells nothing. */
export async function noteRefusal({ orderNumber }: OutOfReach): Promise<void> {
  const viewer = await findViewer();
  if (viewer && orderNumber) after(() => recordRefusal(viewer.id, orderNumber, Date.now()));
}
