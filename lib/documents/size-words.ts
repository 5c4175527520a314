const KB = 1024;

/** A file's size as people read it: "640 KB", "1.4 MB". */
export function sizeWords(sizeBytes: number): string {
  if (sizeBytes < KB * KB) return `${Math.max(1, Math.round(sizeBytes / KB))} KB`;
  const megabytes = sizeBytes / KB / KB;
  return `${megabytes < 10 ? megabytes.toFixed(1) : Math.round(megabytes)} MB`;
}
