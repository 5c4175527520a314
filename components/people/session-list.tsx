import { clockWords, dayWords } from '@/lib/date-words';

type Session = { id: string; device: string; lastSeenAt: number; createdAt: number };
type SessionListProps = { sessions: Session[]; ownId: string; zone: string; nowMs: number };

/** The browsers somebody is signed in with. */
export function SessionList({ sessions, ownId, zone, nowMs }: SessionListProps) {
  return (
    <ul role="list">
      {sessions.map(({ id, device, lastSeenAt, createdAt }) => (
        <li key={id} className="border-b border-line py-3">
          <p className="flex flex-wrap items-baseline justify-between gap-x-4">
            <span className="font-semibold">{device}</span>
            {id === ownId && <span className="text-sm font-semibold text-finish-deep">this browser</span>}
          </p>
          <p className="text-sm text-soft">
            Last used {dayWords(lastSeenAt, zone, nowMs)} at {clockWords(lastSeenAt, zone)}, signed in{' '}
            {dayWords(createdAt, zone, nowMs)}
          </p>
        </li>
      ))}
    </ul>
  );
}
