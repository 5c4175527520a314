'use client';

import { useActionState } from 'react';
import type { StaffTools } from './entry';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { DiaryEntry } from '@/db/queries/diary';
import { fresh } from '@/lib/form-state';

type EntryToolsProps = { entry: DiaryEntry; orderNumber: string; tools: StaffTools };

/** Who reads an entry, and what this member of staff may do with it. */
export function EntryTools({ entry, orderNumber, tools }: EntryToolsProps) {
  const [withdrawn, withdraw, isWithdrawing] = useActionState(tools.withdraw, fresh);
  const [released, release, isReleasing] = useActionState(tools.release, fresh);
  const mayEdit = tools.mayEditAny || entry.authorId === tools.viewerId;
  const refusal = [withdrawn, released].find((state) => state.state === 'refused');
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <p className={entry.state === 'held' ? 'font-semibold text-brass-deep' : 'text-soft'}>{whoReads(entry)}</p>
        {entry.state === 'held' && tools.mayRelease && (
          <form action={release}>
            <input type="hidden" name="entryId" value={entry.id} />
            <Button type="submit" disabled={isReleasing}>
              Release to the buyer
            </Button>
          </form>
        )}
        {mayEdit && (
          <LinkButton variant="quiet" href={`/bench/${orderNumber}/entries/${entry.id}`}>
            Edit
          </LinkButton>
        )}
        {mayEdit && (
          <form action={withdraw}>
            <input type="hidden" name="entryId" value={entry.id} />
            <Button type="submit" variant="quiet" disabled={isWithdrawing}>
              Withdraw
            </Button>
          </form>
        )}
      </div>
      {refusal?.state === 'refused' && (
        <Notice tone="late" role="alert">
          {refusal.message}
        </Notice>
      )}
    </div>
  );
}

function whoReads({ state, audience }: DiaryEntry): string {
  if (state === 'held') return 'Held: waits for a rep’s release';
  return audience === 'shop' ? 'Shop only' : 'The buyer sees it';
}
