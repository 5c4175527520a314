import { randomUUID } from 'node:crypto';
import { Cron } from 'croner';
import { writeDueDigests } from './digests';
import { sendDueMail } from './outbox';
import { developLeftovers } from './photo-pipeline';
import { tendQuestions } from './question-clock';
import { sweep } from './sweep';
import { queueQuietReminders } from '@/db/queries/quiet';
import { refreshWindows } from '@/db/queries/ready-windows';
import { queueSignOffReminders } from '@/db/queries/sign-off-reminders';
import { logFault } from '@/lib/log';

const owner = randomUUID();

declare global {
  var flitchbookJobs: { mailWanted: boolean; mailRunning: boolean; started: boolean } | undefined;
}

const state = () => (globalThis.flitchbookJobs ??= { mailWanted: false, mailRunning: false, started: false });

/** Looks for due mail now; call it after a commit that queued some. Asked while it runs, it looks once more. */
export function wakeMail(): void {
  state().mailWanted = true;
  if (!state().mailRunning) void runMail();
}

async function runMail(): Promise<void> {
  state().mailRunning = true;
  try {
    while (state().mailWanted) {
      state().mailWanted = false;
      await writeDueDigests(owner, Date.now);
      await sendDueMail(owner, Date.now);
    }
  } catch (error) {
    logFault(error, { job: 'mail' });
  } finally {
    state().mailRunning = false;
  }
}

function every(pattern: string, name: string, work: () => Promise<unknown>): void {
  new Cron(pattern, { protect: true, catch: (error) => logFault(error, { job: name }), unref: true }, async () => {
    await work();
  });
}

/** Starts the jobs of this process, once. One process runs them: the one that owns the database. */
export function startJobs(): void {
  if (state().started) return;
  state().started = true;
  every('*/5 * * * * *', 'mail', async () => wakeMail());
  every('30 * * * * *', 'photos', developLeftovers);
  every('20 * * * * *', 'answers due', () => tendQuestions(Date.now()));
  every('*/15 * * * * *', 'ready windows', () => refreshWindows(Date.now()));
  every('50 */15 * * * *', 'quiet builds', () => queueQuietReminders(Date.now()));
  every('40 */15 * * * *', 'sign-off reminders', () => queueSignOffReminders(Date.now()));
  every('15 */10 * * * *', 'sweep', () => sweep(Date.now()));
}
