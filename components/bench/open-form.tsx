'use client';

import { useReducer, useState } from 'react';
import { DiscardDraft } from './discard-draft';
import { draftReducer, isBlank, type Draft } from './draft-state';
import type { OpenedDraft } from './open-draft';
import { PhotoField } from './photo-field';
import { PostFoot } from './post-foot';
import type { PostFormProps } from './post-form';
import { entryFrom } from './post-entry';
import { SignalBanner } from './signal-banner';
import { stageOf } from './stage-choice';
import { StageField } from './stage-field';
import { useKeepDraft } from './use-keep-draft';
import { usePhotos } from './use-photos';
import { usePosting } from './use-posting';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';
import { Segmented } from '@/components/ui/segmented';

type OpenFormProps = PostFormProps & { opened: OpenedDraft; isKeeping: boolean; onDiscarded: () => void };

const audiences = [
  { value: 'buyer', label: 'Buyer sees it' },
  { value: 'shop', label: 'Shop only' },
];

/** The form itself, once the draft is there. Give it another `key` for another draft. */
export function OpenForm({ orderNumber, stages, isHeldFirst, opened, isKeeping, onDiscarded }: OpenFormProps) {
  const { keeper } = opened;
  const [first] = useState<Draft>(opened.draft);
  const [draft, dispatch] = useReducer(draftReducer, first);
  const photos = usePhotos({ orderNumber, first: first.photos, draft, dispatch, keeper });
  useKeepDraft(keeper, draft, first);
  const tryNow = usePosting({
    draft,
    dispatch,
    keeper,
    entryFrom: (whole, ready) => entryFrom({ draft: whole, orderNumber, stages, photos: ready }),
  });
  const tryAll = () => {
    photos.wake();
    tryNow();
  };
  const isLocked = draft.posting.step !== 'writing';
  const problem = draft.posting.step === 'writing' ? draft.posting.problem : undefined;
  return (
    <>
      <SignalBanner draft={draft} isKeeping={isKeeping} />
      <form
        noValidate
        onSubmit={(event) => event.preventDefault()}
        className="mx-auto grid max-w-2xl gap-5 px-4.5 pt-6 pb-12"
      >
        <PhotoField photos={photos} error={problem?.fields.photos} isLocked={isLocked} dispatch={dispatch} />
        <LazyNoteEditor
          initial={first.note ?? undefined}
          label="Note"
          placeholder="What was done, and what comes next"
          onChange={(note) => dispatch({ type: 'written', note })}
          disabled={isLocked}
          invalid={problem?.fields.note}
        />
        <StageField
          stages={stages}
          stageId={stageOf(stages, draft.stageId)}
          startStage={draft.startStage}
          error={problem?.fields.stageId}
          isLocked={isLocked}
          dispatch={dispatch}
        />
        <fieldset disabled={isLocked} className="grid gap-2 disabled:opacity-60">
          <Segmented
            legend="Who sees it"
            isLegendHidden
            name="audience"
            size="bench"
            options={audiences}
            value={draft.audience}
            onChange={({ target }) =>
              dispatch({ type: 'audience-chosen', audience: target.value === 'shop' ? 'shop' : 'buyer' })
            }
            error={problem?.fields.audience}
          />
          {isHeldFirst && draft.audience === 'buyer' && (
            <p className="text-soft">A rep releases it before the buyer sees it.</p>
          )}
        </fieldset>
        <PostFoot draft={draft} dispatch={dispatch} orderNumber={orderNumber} keeper={keeper} onTryNow={tryAll} />
        {!isBlank(draft) && draft.posting.step !== 'posted' && draft.posting.step !== 'sending' && (
          <DiscardDraft onDiscard={() => photos.discardAll().then(onDiscarded)} />
        )}
      </form>
    </>
  );
}
