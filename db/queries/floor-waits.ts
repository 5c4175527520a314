import { listWaitingQuestions } from './question-lists';
import { listWaitingSignOffs } from './sign-offs';
import type { FloorWait } from '@/lib/floor/row';
import { whoseAnswerWords } from '@/lib/questions/whose-answer';
import { waitWords } from '@/lib/sign-offs/wait-words';
import type { Viewer } from '@/lib/viewer';

/** What waits on which build, in two statements for all of them. */
async function listWaits(viewer: Viewer, today: string, nowMs: number): Promise<(FloorWait & { buildId: string })[]> {
  const [signOffs, asked] = await Promise.all([listWaitingSignOffs(viewer), listWaitingQuestions(viewer)]);
  return [
    ...signOffs.map((waiting) => ({
      buildId: waiting.buildId,
      on: waiting.state === 'asked' ? 'the buyer' : 'us',
      words: waitWords(waiting, today, nowMs),
    })),
    ...asked.map(({ buildId, penHolderId, ...question }) => {
      const isReaders = penHolderId === viewer.id;
      return {
        buildId,
        on: isReaders ? 'you' : (question.holderName ?? 'us'),
        words: whoseAnswerWords({ ...question, isReaders }, viewer.timeZone, nowMs),
      };
    }),
  ];
}

/** Who waits for whom, of every build the viewer reaches and as far as they read it. `today` is the shop's date. */
export async function waitsByBuild(viewer: Viewer, today: string, nowMs: number): Promise<Map<string, FloorWait[]>> {
  const byBuild = new Map<string, FloorWait[]>();
  for (const { buildId, ...wait } of await listWaits(viewer, today, nowMs))
    byBuild.set(buildId, [...(byBuild.get(buildId) ?? []), wait]);
  return byBuild;
}
