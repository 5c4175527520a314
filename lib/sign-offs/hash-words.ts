/** The start of a content hash, enough to compare by eye: "9f2c 41a0 77be". */
export const shortHash = (sha256Hex: string) => (sha256Hex.slice(0, 12).match(/.{1,4}/g) ?? []).join(' ');
