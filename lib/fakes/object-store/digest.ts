import { createHash } from 'node:crypto';
import { crc32 } from 'node:zlib';

/** Size and sums of a whole body. */
export interface Digest {
  size_bytes: number;
  md5: Buffer;
  sha256: Buffer;
  /** Big-endian, as S3 sends it. */
  crc32: Buffer;
}

/** Sums a body up while it streams by. */
export class BodyDigest {
  private size_bytes = 0;
  private crc = 0;
  private readonly md5 = createHash('md5');
  private readonly sha256 = createHash('sha256');

  update(part: Uint8Array): void {
    this.size_bytes += part.length;
    this.crc = crc32(part, this.crc);
    this.md5.update(part);
    this.sha256.update(part);
  }

  finish(): Digest {
    const sum = Buffer.alloc(4);
    sum.writeUInt32BE(this.crc);
    return { size_bytes: this.size_bytes, md5: this.md5.digest(), sha256: this.sha256.digest(), crc32: sum };
  }
}
