'use client';

import { useEffect, useState } from 'react';
import { blankDraft } from './kept-draft';
import { openDraft, type OpenedDraft } from './open-draft';
import { OpenForm } from './open-form';
import { OpenElsewhere } from './open-elsewhere';
import type { StageChoice } from './stage-choice';
import { useSoleTab } from './use-sole-tab';
import { SkeletonText } from '@/components/ui/skeleton';
import type { BenchBuild } from '@/lib/readings/plan';

export type PostFormProps = {
  viewerId: string;
  orderNumber: string;
  stages: StageChoice[];
  /** What readings and proof are measured against. */
  bench: BenchBuild;
  /** What this person posts for the buyer waits for a rep's release. */
  isHeldFirst: boolean;
};

/** Writing an entry on a phone: the draft this viewer keeps for this build, in one tab at a time. */
export function PostForm(props: PostFormProps) {
  const { tab, takeOver } = useSoleTab(`flitchbook-bench/${props.viewerId}/${props.orderNumber}`);
  if (tab === 'elsewhere') return <OpenElsewhere onTakeOver={takeOver} />;
  return tab === 'ours' ? <KeptForm {...props} /> : <Opening />;
}

function KeptForm(props: PostFormProps) {
  const { viewerId, orderNumber } = props;
  const [opened, setOpened] = useState<OpenedDraft | null>(null);
  const [isKeeping, setIsKeeping] = useState(true);
  useEffect(() => {
    let isHere = true;
    void openDraft(viewerId, orderNumber, () => setIsKeeping(false)).then((found) => {
      if (isHere) setOpened(found);
    });
    return () => void (isHere = false);
  }, [viewerId, orderNumber]);
  if (!opened) return <Opening />;
  return (
    <OpenForm
      key={opened.draft.idempotencyKey}
      {...props}
      opened={opened}
      isKeeping={isKeeping}
      onDiscarded={() => setOpened({ ...opened, draft: blankDraft(crypto.randomUUID()) })}
    />
  );
}

function Opening() {
  return (
    <div className="mx-auto max-w-2xl px-4.5 py-8">
      <SkeletonText lineCount={5} label="Opening your draft" />
    </div>
  );
}
