/** What one note may hold. The entry form and the save path read the same figures. */
export const NOTE_LIMITS = {
  sizeBytes: 256 * 1024,
  /** Levels of nodes, the document itself counted as the first. */
  depth: 20,
  nodes: 2_000,
  marksPerText: 6,
  hrefLength: 2_048,
} as const;
