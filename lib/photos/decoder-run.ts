import type { ChildProcess } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { decoderReply, type DecoderReply } from './decoder-reply';
import type { DecoderLimits } from './limits';

export interface DecoderJob {
  bytes: Buffer;
  contentType: string;
  sizeBytes: number;
  sha256Hex?: string;
  limits: DecoderLimits;
}

export interface DecoderRules {
  /** Decoders at work at once; a job waits while that many run. */
  concurrency: number;
  timeLimitMs: number;
  memoryLimitBytes: number;
}

const WATCH_EVERY_MS = 50;
/** The watch looks now and then, so it acts before the limit is reached. */
const ACT_AT = 7 / 8;

/** Most memory a process ever held at once, in bytes; 0 where /proc does not tell. */
export function peakMemoryBytes(pid: number | undefined): number {
  try {
    const peakKb = /^VmHWM:\s+(\d+) kB$/m.exec(readFileSync(`/proc/${pid}/status`, 'latin1'))?.[1];
    return Number(peakKb ?? 0) * 1024;
  } catch {
    return 0;
  }
}

const failed = (detail: string): DecoderReply => ({ ok: false, code: 'failed', detail });

function readReply(message: unknown): DecoderReply {
  const reply = decoderReply.safeParse(message);
  return reply.success ? reply.data : failed(`unreadable reply: ${reply.error.message}`);
}

/**
 * One photo in one decoder. Always answers, and answers once: a decoder over its time or memory is killed and its photo
 * refused as too_slow, one that dies by itself fails its photo.
 */
export function decodeIn(child: ChildProcess, job: DecoderJob, rules: DecoderRules): Promise<DecoderReply> {
  return new Promise((resolve) => {
    let killedFor: string | undefined;
    const kill = (reason: string) => {
      killedFor ??= reason;
      child.kill('SIGKILL');
    };
    const timer = setTimeout(() => kill(`over ${rules.timeLimitMs} ms`), rules.timeLimitMs);
    const watch = setInterval(() => {
      const peakBytes = peakMemoryBytes(child.pid);
      if (peakBytes > rules.memoryLimitBytes * ACT_AT) kill(`held ${peakBytes} bytes`);
    }, WATCH_EVERY_MS);
    const finish = (reply: DecoderReply) => {
      clearTimeout(timer);
      clearInterval(watch);
      child.off('message', onMessage).off('exit', onExit).off('error', onError);
      resolve(reply);
    };
    const onMessage = (message: unknown) => finish(readReply(message));
    const onExit = (exitCode: number | null, signal: string | null) =>
      finish(
        killedFor ? { ok: false, code: 'too_slow', detail: killedFor } : failed(`decoder ended: ${signal ?? exitCode}`),
      );
    const onError = (error: Error) => finish(failed(`decoder: ${error.message}`));
    child.on('message', onMessage).on('exit', onExit).on('error', onError);
    child.send(job, (error) => error && child.kill('SIGKILL'));
  });
}
