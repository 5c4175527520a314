/** What arrives, counted as it does; null as soon as it is more than `limitBytes`. */
export async function readLimited(body: AsyncIterable<Uint8Array> | null, limitBytes: number): Promise<Buffer | null> {
  const chunks: Uint8Array[] = [];
  let sizeBytes = 0;
  for await (const chunk of body ?? []) {
    sizeBytes += chunk.byteLength;
    if (sizeBytes > limitBytes) return null;
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}
