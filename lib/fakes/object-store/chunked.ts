import { Refusal } from './refusal';

const LINE_LIMIT_BYTES = 8_192;

/** Takes lines and counted bytes off a stream without holding more than one of its parts. */
class ByteQueue {
  private held: Buffer = Buffer.alloc(0);
  private readonly source: AsyncIterator<Uint8Array>;

  constructor(body: AsyncIterable<Uint8Array>) {
    this.source = body[Symbol.asyncIterator]();
  }

  async line(): Promise<string> {
    let end = this.held.indexOf('\r\n');
    while (end === -1) {
      if (this.held.length > LINE_LIMIT_BYTES) throw new Refusal('IncompleteBody', 'A chunk header is too long.');
      await this.pull();
      end = this.held.indexOf('\r\n');
    }
    const text = this.held.subarray(0, end).toString('latin1');
    this.held = this.held.subarray(end + 2);
    return text;
  }

  async *bytes(count: number): AsyncGenerator<Buffer> {
    let left = count;
    while (left > 0) {
      if (this.held.length === 0) await this.pull();
      const part = this.held.subarray(0, left);
      this.held = this.held.subarray(part.length);
      left -= part.length;
      yield part;
    }
  }

  private async pull(): Promise<void> {
    const next = await this.source.next();
    if (next.done) throw new Refusal('IncompleteBody', 'The body ended inside a chunk.');
    this.held = Buffer.concat([this.held, next.value]);
  }
}

function readChunkSize(header: string): number {
  const digits = /^([0-9a-fA-F]{1,10})(?:;|$)/.exec(header)?.[1];
  if (digits === undefined) throw new Refusal('IncompleteBody', 'A chunk header is not a size.');
  return Number.parseInt(digits, 16);
}

/**
 * The content of a body in `aws-chunked` framing; the trailer's fields are put into `trailers` by lower-case name.
 * @throws Refusal when the framing is broken or ends early
 */
export async function* decodeChunks(
  body: AsyncIterable<Uint8Array>,
  trailers: Map<string, string>,
): AsyncGenerator<Buffer> {
  const queue = new ByteQueue(body);
  for (let size = readChunkSize(await queue.line()); size > 0; size = readChunkSize(await queue.line())) {
    yield* queue.bytes(size);
    if ((await queue.line()) !== '') throw new Refusal('IncompleteBody', 'A chunk is longer than its header says.');
  }
  for (let line = await queue.line(); line !== ''; line = await queue.line()) {
    const [name = '', ...value] = line.split(':');
    trailers.set(name.trim().toLowerCase(), value.join(':').trim());
  }
}
