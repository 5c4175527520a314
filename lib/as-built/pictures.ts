/**
 * Reads pictures a few at a time, in no order, each once. One that cannot be read is left out: a sheet without a picture is
 * better than none.
 * @param read gets one object of the store
 */
export async function readPictures(
  keys: readonly string[],
  read: (key: string) => Promise<Buffer>,
  atOnce = 8,
): Promise<Map<string, Buffer>> {
  const found = new Map<string, Buffer>();
  const left = [...new Set(keys)];
  async function work(): Promise<void> {
    for (let key = left.pop(); key !== undefined; key = left.pop()) {
      const bytes = await read(key).catch(() => null);
      if (bytes && isJpeg(bytes)) found.set(key, bytes);
    }
  }
  await Promise.all(Array.from({ length: atOnce }, work));
  return found;
}

const isJpeg = (bytes: Buffer) => bytes[0] === 0xff && bytes[1] === 0xd8;
