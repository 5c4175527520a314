'use client';

import { useReducer, useRef, useState } from 'react';
import { AudienceField } from './audience-field';
import { DiscardDraft } from './discard-draft';
import { draftReducer, isBlank, type Draft } from './draft-state';
import type { OpenedDraft } from './open-draft';
import { PhotoField } from './photo-field';
import { PostFoot } from './post-foot';
import { Posted } from './posted';
import type { PostFormProps } from './post-form';
import { entryFrom } from './post-entry';
import { SignalBanner } from './signal-banner';
import { stageOf } from './stage-choice';
import { StageField } from './stage-field';
import { StageParts } from './stage-parts';
import { useKeepDraft } from './use-keep-draft';
import { usePhotos } from './use-photos';
import { usePosting } from './use-posting';
import { useShowProblem } from './use-show-problem';
import { LazyNoteEditor } from '@/components/rich-text/lazy-note-editor';

type OpenFormProps = PostFormProps & { opened: OpenedDraft; isKeeping: boolean; onDiscarded: () => void };

/** The form itself, once the draft is there. Give it another `key` for another draft. */
export function OpenForm({ orderNumber, stages, bench, isHeldFirst, opened, isKeeping, onDiscarded }: OpenFormProps) {
  const { keeper } = opened;
  const [first] = useState<Draft>(opened.draft);
  const [draft, dispatch] = useReducer(draftReducer, first);
  const photos = usePhotos({ orderNumber, first: first.photos, draft, dispatch, keeper });
  useKeepDraft(keeper, draft, first);
  const tryNow = usePosting({
    draft,
    dispatch,
    keeper,
    entryFrom: (whole, ready) => entryFrom({ draft: whole, orderNumber, stages, items: bench.items, photos: ready }),
    onPhotosMissing: photos.recheck,
  });
  const tryAll = () => {
    photos.wake();
    tryNow();
  };
  const isLocked = draft.posting.step !== 'writing';
  const problem = draft.posting.step === 'writing' ? draft.posting.problem : undefined;
  const form = useRef<HTMLFormElement>(null);
  useShowProblem(form, problem);
  const stageId = stageOf(stages, draft.stageId);
  return (
    <>
      <SignalBanner draft={draft} isKeeping={isKeeping} />
      <form
        ref={form}
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
          stageId={stageId}
          startStage={draft.startStage}
          error={problem?.fields.stageId}
          isLocked={isLocked}
          dispatch={dispatch}
        />
        <StageParts
          draft={draft}
          stages={stages}
          stageId={stageId}
          bench={bench}
          fields={problem?.fields ?? {}}
          isLocked={isLocked}
          dispatch={dispatch}
        />
        <AudienceField
          audience={draft.audience}
          isHeldFirst={isHeldFirst}
          error={problem?.fields.audience}
          isLocked={isLocked}
          dispatch={dispatch}
        />
        {draft.posting.step === 'posted' ? (
          <Posted orderNumber={orderNumber} keeper={keeper} {...draft.posting} />
        ) : (
          <PostFoot draft={draft} dispatch={dispatch} isReading={photos.isReading} onTryNow={tryAll} />
        )}
        {!isBlank(draft) && draft.posting.step !== 'posted' && draft.posting.step !== 'sending' && (
          <DiscardDraft onDiscard={() => photos.discardAll().then(onDiscarded)} />
        )}
      </form>
    </>
  );
}
