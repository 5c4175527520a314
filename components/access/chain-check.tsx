import { Notice } from '@/components/ui/notice';

/** Whether the record is whole; `brokenSeq` is the first line whose seal does not fit. */
export function ChainCheck({ brokenSeq }: { brokenSeq: number | null }) {
  if (brokenSeq === null)
    return (
      <Notice tone="done" title="Every seal holds">
        From the first line to the newest, each follows from the one before. Nothing was changed or taken out between.
      </Notice>
    );
  return (
    <Notice tone="late" title={`The seal of line ${brokenSeq} does not fit`}>
      Somebody changed the database itself at this line or just before it. Keep a copy of the database as it is, and
      compare it with the last backup.
    </Notice>
  );
}
