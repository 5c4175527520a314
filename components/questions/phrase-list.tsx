import { PhraseForm } from './phrase-form';
import { ConfirmForm } from '@/components/people/confirm-form';
import type { PhraseRow } from '@/db/queries/phrases';
import type { FormAction } from '@/lib/action';

type PhraseListProps = {
  phrases: PhraseRow[];
  keep: FormAction;
  drop: FormAction;
  mayChange: boolean;
  mayKeepShop: boolean;
};

/** Saved phrases with their words; who may change them opens each in its place. */
export function PhraseList({ phrases, keep, drop, mayChange, mayKeepShop }: PhraseListProps) {
  return (
    <ul role="list">
      {phrases.map((phrase) => (
        <li key={phrase.id} className="grid gap-1.5 border-b border-line py-4 first:pt-0">
          <h3 className="text-base">
            <bdi>{phrase.title}</bdi>
          </h3>
          <p dir="auto" className="max-w-[62ch] font-read whitespace-pre-wrap wrap-anywhere">
            {phrase.words}
          </p>
          {mayChange && (
            <details className="mt-1">
              <summary className="min-h-11 w-fit cursor-pointer py-2.5 font-semibold text-finish-deep md:min-h-8 md:py-1">
                Change<span className="sr-only"> {phrase.title}</span>
              </summary>
              <div className="grid max-w-xl gap-4 pt-3 pb-2">
                <PhraseForm
                  key={`${phrase.title} ${phrase.words}`}
                  keep={keep}
                  phrase={phrase}
                  mayKeepShop={mayKeepShop}
                />
                <ConfirmForm
                  send={drop}
                  values={{ phraseId: phrase.id }}
                  label="Take it away"
                  name={`Take away: ${phrase.title}`}
                  title={`Take “${phrase.title}” away?`}
                  description="Letters that were written with it stay as they are."
                />
              </div>
            </details>
          )}
        </li>
      ))}
    </ul>
  );
}
