import { fork, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { decodeIn, peakMemoryBytes, type DecoderJob, type DecoderRules } from './decoder-run';
import type { DecoderReply } from './decoder-reply';
import { DECODER_IDLE_MS } from './limits';

interface Waiting {
  job: DecoderJob;
  rules: DecoderRules;
  settle: (reply: DecoderReply) => void;
}

function forkDecoder(): ChildProcess {
  const child = fork(join(/* turbopackIgnore: true */ process.cwd(), 'lib/photos/decoder.mjs'), [], {
    serialization: 'advanced',
    stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    execArgv: ['--max-old-space-size=96'],
    // Nothing else: a picture that took the decoder over must find no secret there.
    env: { PATH: process.env.PATH, NODE_ENV: process.env.NODE_ENV },
  });
  return child.on('error', () => child.kill('SIGKILL'));
}

/** Decoder processes, reused while healthy, and the photos waiting for one in the order they came. */
export class DecoderPool {
  readonly #busy = new Set<ChildProcess>();
  readonly #idle = new Map<ChildProcess, NodeJS.Timeout>();
  readonly #queue: Waiting[] = [];

  run(job: DecoderJob, rules: DecoderRules): Promise<DecoderReply> {
    return new Promise((settle) => {
      this.#queue.push({ job, rules, settle });
      this.#next();
    });
  }

  /** Ends every decoder; photos at work or waiting are answered as failed. */
  async stop(): Promise<void> {
    for (const { settle } of this.#queue.splice(0)) settle({ ok: false, code: 'failed', detail: 'decoders stopped' });
    const children = [...this.#busy, ...this.#idle.keys()].filter(
      ({ exitCode, signalCode }) => exitCode === null && signalCode === null,
    );
    const exits = children.map((child) => once(child, 'exit'));
    for (const child of children) {
      child.ref();
      child.kill('SIGKILL');
    }
    await Promise.all(exits);
  }

  #next(): void {
    const head = this.#queue[0];
    if (!head || this.#busy.size >= head.rules.concurrency) return;
    this.#queue.shift();
    this.#work(head).catch((error) => head.settle({ ok: false, code: 'failed', detail: `no decoder: ${error}` }));
  }

  async #work({ job, rules, settle }: Waiting): Promise<void> {
    const child = this.#take();
    settle(await decodeIn(child, job, rules));
    this.#busy.delete(child);
    // What one photo made the process hold counts against the next, so a swollen decoder is not kept.
    if (peakMemoryBytes(child.pid) < rules.memoryLimitBytes / 2) this.#keep(child);
    else child.kill('SIGKILL');
    this.#next();
  }

  #take(): ChildProcess {
    const [kept] = this.#idle.keys();
    if (kept) this.#drop(kept);
    const child = kept ?? forkDecoder().once('exit', () => this.#drop(child));
    child.ref();
    child.channel?.ref();
    this.#busy.add(child);
    return child;
  }

  #keep(child: ChildProcess): void {
    if (!child.connected || child.killed || child.pid === undefined) return;
    const retire = setTimeout(() => child.kill('SIGKILL'), DECODER_IDLE_MS).unref();
    this.#idle.set(child, retire);
    child.unref();
    child.channel?.unref();
  }

  #drop(child: ChildProcess): void {
    clearTimeout(this.#idle.get(child));
    this.#idle.delete(child);
  }
}
