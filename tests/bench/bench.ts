import { writeFileSync } from 'node:fs';
import { stopAll } from '../../db/demo/steps.mjs';
import { asBuiltPdf } from './as-built-pdf';
import { diary } from './diary';
import { diaryJs } from './diary-js';
import { digestKill } from './digest-kill';
import { digestRun } from './digest-run';
import { floor500 } from './floor-500';
import { photoMemory } from './photo-memory';
import { photoPipeline } from './photos';
import type { Bench, Row } from './row';
import { specKeystroke } from './spec-keystroke';
import { search } from './search';
import { windowCoverage } from './window-coverage';
import { windows500 } from './windows-500';

const FILE = '.data/bench.json';

/** In this order; another bench is one more file and one more name here. */
const benches: Bench[] = [
  diaryJs,
  specKeystroke,
  photoPipeline,
  photoMemory,
  diary,
  floor500,
  windows500,
  windowCoverage,
  asBuiltPdf,
  digestRun,
  digestKill,
  search,
];

const inShort = (value: number) => (value >= 100 ? value.toFixed(0) : value.toPrecision(3));

function asTable(rows: Row[]) {
  return rows.map(({ name, value, floor, ratio, target, unit, isMet }) => ({
    name,
    value: inShort(value),
    floor: inShort(floor),
    unit,
    ratio: inShort(ratio),
    target,
    verdict: isMet ? 'met' : 'MISSED',
  }));
}

async function main(wanted: string[]): Promise<void> {
  const rows: Row[] = [];
  for (const { name, run } of benches.filter((bench) => wanted.length === 0 || wanted.includes(bench.name))) {
    console.log(`Measuring ${name} …`);
    rows.push(...(await run()));
  }
  console.table(asTable(rows));
  if (wanted.length === 0) {
    const kept = rows.map(({ name, value, floor, ratio, target, unit }) => ({
      name,
      value,
      floor,
      ratio,
      target,
      unit,
    }));
    writeFileSync(FILE, `${JSON.stringify(kept, null, 2)}\n`);
  }
  const missed = rows.filter((row) => !row.isMet).map((row) => row.name);
  if (rows.length === 0 || missed.length > 0) process.exitCode = 1;
  if (missed.length > 0) console.log(`Missed: ${missed.join(', ')}`);
}

process.once('SIGTERM', () => {
  stopAll();
  process.exit(1);
});
await main(process.argv.slice(2)).finally(stopAll);
