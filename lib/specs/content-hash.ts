import { createHash } from 'node:crypto';
import { canonicalJson } from './canonical';

/** SHA-256 of the canonical JSON, hex: what a signature stands under. */
export const contentHashOf = (content: unknown) => createHash('sha256').update(canonicalJson(content)).digest('hex');
