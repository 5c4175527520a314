import type { ReactNode } from 'react';
import type { AuditAction } from '@/db/queries/audit';

export type ToldEvent = {
  action: AuditAction;
  reason: string | null;
  actorId: string | null;
  actorName: string | null;
  subjectId: string | null;
  subjectName: string | null;
  orderNumber?: string | null;
};

type Parts = { who: ReactNode; whom: ReactNode; build: ReactNode; isOwn: boolean; reason: string | null };

const sentences: Record<AuditAction, (parts: Parts) => ReactNode> = {
  signed_in: ({ who }) => <>{who} signed in</>,
  signed_out: ({ who }) => <>{who} signed out</>,
  sessions_ended: ({ who, whom, isOwn }) =>
    isOwn ? (
      <>{who} signed out everywhere else</>
    ) : (
      <>
        {who} signed {whom} out everywhere
      </>
    ),
  invited: ({ who, whom }) => (
    <>
      {who} invited {whom}
    </>
  ),
  role_changed: ({ who, whom, reason }) => (
    <>
      {who} changed what {whom} is: {reason}
    </>
  ),
  person_closed: ({ who, whom }) => (
    <>
      {who} closed the account of {whom}
    </>
  ),
  person_reopened: ({ who, whom }) => (
    <>
      {who} opened the account of {whom} again
    </>
  ),
  assigned: ({ who, whom, build, isOwn }) =>
    isOwn ? (
      <>
        {who} came onto {build}
      </>
    ) : (
      <>
        {who} put {whom} on {build}
      </>
    ),
  cleared: ({ who, whom, build, isOwn }) =>
    isOwn ? (
      <>
        {who} is cleared for the hold on {build}
      </>
    ) : (
      <>
        {who} cleared {whom} for the hold on {build}
      </>
    ),
  assignment_ended: ({ who, whom, build, isOwn }) =>
    isOwn ? (
      <>
        {who} left {build}
      </>
    ) : (
      <>
        {who} took {whom} off {build}
      </>
    ),
  stepped_in: ({ who, build }) => (
    <>
      {who} stepped in on {build}
    </>
  ),
  companion_added: ({ who, whom, build }) => (
    <>
      {who} let {whom} look on at {build}
    </>
  ),
  companion_removed: ({ who, whom, build }) => (
    <>
      {who} stopped {whom} looking on at {build}
    </>
  ),
  held: ({ who, build }) => (
    <>
      {who} held {build} from view
    </>
  ),
  opened: ({ who, build }) => (
    <>
      {who} opened {build} to view
    </>
  ),
  entry_released: ({ who, build }) => (
    <>
      {who} released an entry of {build}
    </>
  ),
  sign_off_asked: ({ who, build }) => (
    <>
      {who} put something of {build} before its owner to sign
    </>
  ),
  sign_off_withdrawn: ({ who, build }) => (
    <>
      {who} took back what its owner was to sign for {build}
    </>
  ),
  sign_off_signed: ({ who, build }) => (
    <>
      {who} signed for {build}
    </>
  ),
  sign_off_change_asked: ({ who, build }) => (
    <>
      {who} asked for a change instead of signing for {build}
    </>
  ),
  check_passed: ({ who, build, reason }) => (
    <>
      {who} passed the inspection {reason} of {build}
    </>
  ),
  check_failed: ({ who, build, reason }) => (
    <>
      {who} failed the inspection {reason} of {build}
    </>
  ),
  check_told: ({ who, build }) => (
    <>
      {who} told the player of a failed inspection of {build}
    </>
  ),
  check_kept: ({ who, build }) => (
    <>
      {who} kept a failed inspection of {build} in the shop
    </>
  ),
  final_check_passed: ({ who, build }) => (
    <>
      {who} passed the final check of {build}
    </>
  ),
  shipped: ({ who, build, reason }) => (
    <>
      {who} shipped {build} with {reason}
    </>
  ),
  delivered: ({ who, build }) => (
    <>
      {who} marked {build} as delivered
    </>
  ),
  build_read: ({ who, build }) => (
    <>
      {who} asked for {build}
    </>
  ),
};

const named = (name: string | null) => <bdi className="font-semibold">{name ?? 'somebody'}</bdi>;

/** An event as a sentence without its full stop: "Nadia put Tove on Q-2417". */
export function EventWords({ event }: { event: ToldEvent }) {
  const build = event.orderNumber ? <span className="narrow font-semibold">{event.orderNumber}</span> : 'this build';
  return sentences[event.action]({
    who: named(event.actorName),
    whom: named(event.subjectName),
    build,
    isOwn: event.actorId !== null && event.actorId === event.subjectId,
    reason: event.reason,
  });
}
