import { chromium, type Page } from '@playwright/test';
import { eq } from 'drizzle-orm';
import { Database } from '@/db/client';
import { builds, buildStages, materials, specDrafts } from '@/db/schema';
import { slotWords } from '@/lib/craft/fret-words';
import { materialRows } from '@/lib/craft/materials';
import type { SpecDocument, SpecItem } from '@/lib/specs/document';
import { fitTemplate } from '@/lib/specs/fit-template';
import { specGroups } from '@/lib/specs/document';
import { starterTemplates } from '@/lib/specs/templates';
import { requireBrowser } from '../browser/find-chromium.mjs';
import { openApp } from './app';
import { fillDatabase, orderNumberOf, staffToken } from './fill';
import { median, valueBelow, type Bench } from './row';

const ITEMS = 120;
const ROUNDS = 5;
const KEYS = 48;
const WARM_UP = 8;
const MM_PER_INCH = 25.4;

/** The six-string template, filled up to 120 items with measures of every group. */
function longDocument(stageKeys: ReadonlySet<string>): SpecDocument {
  const [template] = starterTemplates;
  const { items } = fitTemplate(template?.document ?? { items: [] }, { scaleLengthIn: 25.5, stageKeys });
  const [firstStage = null] = stageKeys;
  const more = Array.from({ length: ITEMS - items.length }, (_, n): SpecItem => ({
    key: `further_${n}`,
    group: specGroups[n % specGroups.length] ?? 'body',
    label: `Further measure ${n + 1}`,
    frozenFrom: firstStage,
    provenAt: firstStage,
    kind: 'measure',
    aim: { text: `1.${100 + n}`, unit: 'in' },
    tolerance: { plus: '0.010', minus: '0.005' },
  }));
  return { items: [...items, ...more] };
}

async function fillWithDraft(file: string, count: number, nowMs: number): Promise<void> {
  await fillDatabase(file, count, nowMs);
  const database = new Database(`file:${file}`);
  await database.write(async (tx) => {
    await tx.insert(materials).values(materialRows());
    const [build] = await tx
      .select({ id: builds.id })
      .from(builds)
      .where(eq(builds.orderNumber, orderNumberOf(0)));
    if (!build) throw new Error('The bench has no build.');
    const stages = await tx.select({ key: buildStages.key }).from(buildStages).where(eq(buildStages.buildId, build.id));
    const document = longDocument(new Set(stages.map(({ key }) => key)));
    await tx.insert(specDrafts).values({ buildId: build.id, document, editedById: 'staff-1', editedAt: nowMs });
  });
  database.close();
}

/**
 * From the key's event until the frame that shows its effect has been handed to the compositor, with what the page shows by
 * then. As text: it runs in the page.
 */
const watch = (shown: string) => `
  document.addEventListener('input', (event) => {
    requestAnimationFrame(() => {
      const painted = new MessageChannel();
      painted.port1.onmessage = () => {
        const ms = performance.now() - event.timeStamp;
        const shown = document.querySelector(${JSON.stringify(shown)})?.textContent ?? '';
        const drawn = document.querySelector('figure svg polygon')?.getAttribute('points') ?? '';
        window.tell({ ms, shown, drawn });
      };
      painted.port2.postMessage(0);
    });
  }, true);
`;

type Stroke = { ms: number; shown: string; drawn: string };

/** Types 25., 25.1, 25., 25.2 … into the scale: every stroke changes every slot. */
async function strokes(page: Page, shown: string): Promise<{ typed: number; stroke: Stroke }[]> {
  const field = page.getByLabel('Scale length', { exact: true });
  await field.click();
  await field.press('End');
  await page.evaluate(watch(shown));
  const seen: { typed: number; stroke: Stroke }[] = [];
  for (let key = 0; key < KEYS; key++) {
    await page.evaluate('void (window.told = new Promise((tell) => (window.tell = tell)))');
    await page.keyboard.press(key % 2 === 0 ? 'Backspace' : `${((key - 1) / 2) % 9}`);
    const stroke: Stroke = await page.evaluate('window.told');
    seen.push({ typed: Number(await field.inputValue()), stroke });
  }
  return seen.slice(WARM_UP);
}

/** @throws Error when the table or the drawing was not that of the scale just typed */
function requireRecomputed(seen: { typed: number; stroke: Stroke }[]): void {
  for (const { typed, stroke } of seen) {
    const bridge = `Bridge${slotWords(typed * MM_PER_INCH, 'in')}${slotWords(typed * MM_PER_INCH, 'mm')}`;
    if (stroke.shown !== bridge) throw new Error(`The table shows "${stroke.shown}" for a scale of ${typed} in.`);
  }
  const drawings = new Map(seen.map(({ typed, stroke }) => [typed, stroke.drawn]));
  if (new Set(drawings.values()).size !== drawings.size) throw new Error('The drawing did not follow the scale.');
}

/** Milliseconds that 95 of 100 strokes stay below. */
function p95(seen: { stroke: Stroke }[]): number {
  const sorted = seen.map(({ stroke }) => stroke.ms).toSorted((one, other) => one - other);
  return sorted[Math.ceil(sorted.length * 0.95) - 1] ?? NaN;
}

/**
 * A key stroke in the scale of a spec of 120 items, until table and drawing are painted anew, beside one bare field: the 95th
 * percentile of a round, and of the rounds the median, since a frame waits for whatever else the machine is doing.
 */
export const specKeystroke: Bench = {
  name: 'spec-keystroke',
  run: async () => {
    const app = await openApp(20, false, fillWithDraft);
    const browser = await chromium.launch({ executablePath: requireBrowser(), args: ['--no-sandbox'] });
    try {
      const context = await browser.newContext({ viewport: { width: 1360, height: 1000 } });
      await context.addCookies([{ name: 'flitchbook-session', value: staffToken(1), url: app.url }]);
      const page = await context.newPage();
      const rounds: { bare: number; spec: number }[] = [];
      for (let round = 0; round < ROUNDS; round++) {
        await page.goto(`${app.url}/typing`);
        const bare = await strokes(page, 'output');
        await page.goto(`${app.url}/builds/${orderNumberOf(0)}/spec/edit`);
        const spec = await strokes(page, 'section[aria-label="Fret table"] tbody tr:last-child');
        requireRecomputed(spec);
        rounds.push({ bare: p95(bare), spec: p95(spec) });
      }
      const value = median(rounds.map(({ spec }) => spec));
      const floor = median(rounds.map(({ bare }) => bare));
      return [valueBelow(50, { name: 'spec-keystroke', value, floor, unit: 'ms' })];
    } finally {
      await browser.close();
      await app.stop();
    }
  },
};
