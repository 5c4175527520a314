import { stopAll } from '../../db/demo/steps.mjs';
import { benches } from './benches';

/** Measures the bench that is named, for `bench.ts`. */
async function main(name: string | undefined): Promise<void> {
  const bench = benches.find((one) => one.name === name);
  if (!bench) throw new Error(`There is no bench called ${name}.`);
  process.send?.(await bench.run());
}

process.once('SIGTERM', () => {
  stopAll();
  process.exit(1);
});
await main(process.argv[2]).finally(stopAll);
process.disconnect?.();
