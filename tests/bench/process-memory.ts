import { readdirSync, readFileSync } from 'node:fs';

const EVERY_MS = 50;

function childrenOf(pid: number): number[] {
  const children = readdirSync(`/proc/${pid}/task`).flatMap((task) =>
    readFileSync(`/proc/${pid}/task/${task}/children`, 'utf8').split(' '),
  );
  return children.filter(Boolean).map(Number);
}

/** Resident megabytes of a process and everything below it; a process that ended meanwhile counts as nothing. */
function residentMb(pid: number): number {
  try {
    const kilobytes = Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${pid}/status`, 'utf8'))?.[1] ?? 0);
    return childrenOf(pid).reduce((sum, child) => sum + residentMb(child), kilobytes / 1000);
  } catch {
    return 0;
  }
}

/** The most that a process tree held in memory while something was done, looked at 20 times a second. Linux only. */
export async function peakMb(pid: number, work: () => Promise<unknown>): Promise<number> {
  let most = residentMb(pid);
  const watch = setInterval(() => (most = Math.max(most, residentMb(pid))), EVERY_MS);
  try {
    await work();
  } finally {
    clearInterval(watch);
  }
  return most;
}
