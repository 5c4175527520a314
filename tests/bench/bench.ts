import { fork } from 'node:child_process';
import { once } from 'node:events';
import { writeFileSync } from 'node:fs';
import { benches } from './benches';
import type { Row } from './row';

const FILE = '.data/bench.json';

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

/** In a process of its own: what one bench has opened or warmed is not there for the next. */
async function measure(name: string): Promise<Row[]> {
  const child = fork('tests/bench/one.ts', [name]);
  const ended = once(child, 'exit');
  const rows: Row[] = [];
  child.on('message', (measured: Row[]) => rows.push(...measured));
  const [code] = await ended;
  if (code !== 0) throw new Error(`${name} could not be measured (see above).`);
  return rows;
}

async function main(wanted: string[]): Promise<void> {
  const rows: Row[] = [];
  for (const { name } of benches.filter((bench) => wanted.length === 0 || wanted.includes(bench.name))) {
    console.log(`Measuring ${name} …`);
    rows.push(...(await measure(name)));
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

await main(process.argv.slice(2));
