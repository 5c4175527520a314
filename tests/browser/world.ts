import { worldOf } from './worlds.mjs';

/** The world of this worker. */
export const world = worldOf(Number(process.env.TEST_PARALLEL_INDEX ?? 0));
