'use client';

import dynamic from 'next/dynamic';
import { useState } from 'react';
import { EntryReadings } from './entry-readings';
import { PhotoGrid } from '@/components/photos/photo-grid';
import { LargeView } from '@/components/photos/large-view';
import { NoteText } from '@/components/rich-text/note-text';
import { Avatar } from '@/components/ui/avatar';
import type { DiaryEntry } from '@/db/queries/diary';
import { dayWords, marginDate } from '@/lib/date-words';
import type { FormState } from '@/lib/form-state';

type EntryAction = (previous: FormState, form: FormData) => Promise<FormState>;

export type StaffTools = {
  viewerId: string;
  mayEditAny: boolean;
  mayRelease: boolean;
  withdraw: EntryAction;
  release: EntryAction;
};

/** What every entry of a page needs to know of its reader. */
export type EntryView = {
  orderNumber: string;
  zone: string;
  nowMs: number;
  /** Entries dated after this are new; null marks none. */
  newSinceMs: number | null;
  mayAsk: boolean;
  tools?: StaffTools;
};

/** Shop-side controls: fetched for staff only, so that a reader's page stays small. */
const EntryTools = dynamic(() => import('./entry-tools').then((module) => module.EntryTools));

export function Entry({ entry, isFirst, ...view }: EntryView & { entry: DiaryEntry; isFirst: boolean }) {
  const [openAt, setOpenAt] = useState<number | null>(null);
  const isNew = view.newSinceMs !== null && entry.datedAt > view.newSinceMs;
  return (
    <li id={`entry-${entry.id}`} className="grid scroll-mt-4 md:grid-cols-[6.5rem_minmax(0,1fr)]">
      <Margin entry={entry} isNew={isNew} {...view} />
      <article className="grid gap-4 pt-3 pb-8 md:border-l md:border-line md:pt-6 md:pl-6">
        <p className="hidden items-center gap-3 md:flex">
          <Avatar name={entry.author} />
          <Byline entry={entry} />
        </p>
        {!isBlank(entry.body) && <NoteText doc={entry.body} />}
        <PhotoGrid photos={entry.photos} isFirst={isFirst} onOpen={setOpenAt} />
        <EntryReadings entry={entry} orderNumber={view.orderNumber} />
        <Foot entry={entry} {...view} />
      </article>
      {openAt !== null && <LargeView photos={entry.photos} startAt={openAt} onClose={() => setOpenAt(null)} />}
    </li>
  );
}

const isBlank = (body: unknown) =>
  typeof body === 'object' &&
  body !== null &&
  'content' in body &&
  Array.isArray(body.content) &&
  body.content.length === 0;

function Byline({ entry }: { entry: DiaryEntry }) {
  return (
    <span>
      <bdi className="font-semibold">{entry.author}</bdi>
      {entry.department && <span className="text-soft">, {entry.department}</span>}
      {entry.edited === 1 && <span className="text-soft"> · edited</span>}
    </span>
  );
}

function Margin({ entry, isNew, zone, nowMs }: EntryView & { entry: DiaryEntry; isNew: boolean }) {
  const { day, month } = marginDate(entry.datedAt, zone);
  const date = new Date(entry.datedAt).toISOString();
  return (
    <>
      <p className="hidden pt-5 pr-4 text-right md:block">
        <time dateTime={date}>
          <span className="narrow block text-3xl leading-8 font-semibold">{day}</span>
          <span className="block text-sm text-soft">{month}</span>
        </time>
        {isNew && <span className="block text-sm font-semibold text-finish-deep">New</span>}
      </p>
      <p className="flex justify-between gap-4 pt-5 md:hidden">
        <span>
          <time dateTime={date} className="font-semibold">
            {dayWords(entry.datedAt, zone, nowMs)}
          </time>
          <span className="text-soft"> · </span>
          <Byline entry={entry} />
        </span>
        {isNew && <span className="font-semibold text-finish-deep">New</span>}
      </p>
    </>
  );
}

function Foot({ entry, orderNumber, mayAsk, tools }: EntryView & { entry: DiaryEntry }) {
  if (tools) return <EntryTools entry={entry} orderNumber={orderNumber} tools={tools} />;
  if (!mayAsk) return null;
  const [firstName] = entry.author.split(' ');
  return (
    <p>
      <a
        href={`/builds/${orderNumber}/questions/new?entry=${entry.id}`}
        className="inline-flex min-h-11 items-center font-semibold text-finish-deep hover:underline"
      >
        Ask {firstName} about this
      </a>
    </p>
  );
}
