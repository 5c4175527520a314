import type { Page } from '@playwright/test';

const STEPS = 120;

type TraceEvent = {
  name: string;
  ph: string;
  pid: number;
  tid: number;
  /** Microseconds of the processor that the task had, whatever else ran on the machine meanwhile. */
  tdur?: number;
  args: { name?: string };
};

/** To the end and back, a step in each frame. */
function scrollThrough(page: Page): Promise<void> {
  return page.evaluate(async (count) => {
    const end = document.documentElement.scrollHeight - window.innerHeight;
    for (let step = 0; step <= count; step++) {
      const share = step / count;
      window.scrollTo(0, Math.round(end * (share < 0.5 ? share * 2 : 2 - share * 2)));
      await new Promise<number>((resolve) => requestAnimationFrame(resolve));
    }
  }, STEPS);
}

function longestTaskMs(events: TraceEvent[]): number {
  const isMain = ({ name, args }: TraceEvent) => name === 'thread_name' && args.name === 'CrRendererMain';
  const main = new Set(events.filter(isMain).map(({ pid, tid }) => `${pid} ${tid}`));
  const tasks = events.filter(
    ({ ph, name, pid, tid }) => ph === 'X' && name.endsWith('RunTask') && main.has(`${pid} ${tid}`),
  );
  if (tasks.length === 0) throw new Error('The trace has no task of the page.');
  return Math.max(...tasks.map(({ tdur = 0 }) => tdur)) / 1000;
}

/**
 * The most work, in milliseconds of the processor, that a page puts into one frame while it is scrolled through: at 100
 * people see it stand still. Counted from Chromium's own trace and not by the clock, for on a busy machine the clock
 * counts the work of others.
 */
export async function longestFrameMs(page: Page): Promise<number> {
  const browser = page.context().browser();
  if (!browser) throw new Error('This page has no browser to trace.');
  await browser.startTracing(page, { categories: ['toplevel'] });
  await scrollThrough(page);
  const { traceEvents }: { traceEvents: TraceEvent[] } = JSON.parse((await browser.stopTracing()).toString());
  return longestTaskMs(traceEvents);
}

/** Makes an empty page as long as the floor with five hundred builds. */
export async function stretch(page: Page): Promise<void> {
  await page.evaluate(() => document.body.style.setProperty('height', '32000px'));
}
