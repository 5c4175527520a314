import { UnlinkForm } from './unlink-form';
import type { FormAction } from '@/lib/action';
import { shortDay } from '@/lib/date-words';
import type { ProofLine } from '@/lib/specs/proof';

type NextStepProps = {
  line: ProofLine;
  orderNumber: string;
  stageNames: Record<string, string>;
  zone: string;
  /** Left out once the final check has passed. */
  unlink?: FormAction;
};

/** What mends an item, or the entries that show it. */
export function NextStep({ line, orderNumber, stageNames, zone, unlink }: NextStepProps) {
  const sentence = nextSentence(line, stageNames);
  const isUnseen = line.state === 'proven' && !line.proofs.some(({ isForOwner }) => isForOwner);
  return (
    <div className="grid gap-1">
      {sentence && <p>{sentence}</p>}
      {isUnseen && (
        <p className="text-sm text-soft">Only the shop reads its proof: on the owner’s sheet it stays open.</p>
      )}
      {line.proofs.map(({ entryId, datedAt, stageName }) => (
        <div key={entryId} className="flex flex-wrap items-center gap-x-3">
          <a
            href={`/builds/${orderNumber}#entry-${entryId}`}
            className="font-semibold text-finish-deep hover:underline"
          >
            {shortDay(datedAt, zone)}, {stageName}
          </a>
          {unlink && <UnlinkForm unlink={unlink} values={{ orderNumber, itemKey: line.item.key, entryId }} />}
        </div>
      ))}
    </div>
  );
}

function nextSentence({ item, state, waitsForSignOff }: ProofLine, stageNames: Record<string, string>): string | null {
  if (waitsForSignOff !== null) return `Waits for the owner to sign “${waitsForSignOff}”.`;
  if (state === 'out_of_tolerance') return 'Put it right and measure again, or a rep asks the owner for a concession.';
  if (state !== 'open') return null;
  const where = item.provenAt === null ? '' : ` in ${stageNames[item.provenAt] ?? item.provenAt}`;
  if (item.kind === 'measure' && item.tolerance) return `Measure it${where} and post the reading.`;
  if (item.kind === 'look' && item.colour) return `Measure its colour${where} and post the reading.`;
  return `Post an entry that shows it${where}, or link one below.`;
}
