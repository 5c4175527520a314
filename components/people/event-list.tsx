import { EventWords, type ToldEvent } from './event-words';
import { clockWords, dayWords } from '@/lib/date-words';

export type ListedEvent = ToldEvent & { seq: number; at: number; outcome: 'done' | 'refused' };

/** What happened, newest first, the date in the margin. A reason somebody gave is set as text to read. */
export function EventList({ events, zone, nowMs }: { events: ListedEvent[]; zone: string; nowMs: number }) {
  return (
    <ol className="grid">
      {events.map((event) => (
        <li key={event.seq} className="grid gap-x-6 border-b border-line py-3 sm:grid-cols-[11rem_minmax(0,1fr)]">
          <time dateTime={new Date(event.at).toISOString()} className="narrow text-soft">
            {dayWords(event.at, zone, nowMs)}, {clockWords(event.at, zone)}
          </time>
          <div className="min-w-0 break-words">
            <EventWords event={event} />
            {event.outcome === 'refused' && <span className="font-semibold text-late"> and was refused</span>}
            {event.action === 'stepped_in' && event.reason && (
              <q className="mt-1 block font-read text-soft">{event.reason}</q>
            )}
          </div>
        </li>
      ))}
    </ol>
  );
}
