import { NOTE_LIMITS } from './limits';
import { NoteRefusal } from './refusal';

/**
 * Walks a document from outside without recursion, so that depth and size are known before anything else touches it.
 * Counts nodes, levels and UTF-16 units of text (never more than its bytes in JSON). Says nothing about meaning.
 * @throws NoteRefusal when a limit is passed
 */
export function requireWithinLimits(input: unknown): void {
  const waiting: { node: unknown; level: number }[] = [{ node: input, level: 1 }];
  let nodes = 1;
  let textLength = 0;
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { node, level } = next;
    if (typeof node !== 'object' || node === null) continue;
    if ('text' in node && typeof node.text === 'string') textLength += node.text.length;
    const children: readonly unknown[] = 'content' in node && Array.isArray(node.content) ? node.content : [];
    nodes += children.length;
    if (nodes > NOTE_LIMITS.nodes || textLength > NOTE_LIMITS.sizeBytes) throw new NoteRefusal('long');
    if (children.length > 0 && level === NOTE_LIMITS.depth) throw new NoteRefusal('deep');
    for (const child of children) waiting.push({ node: child, level: level + 1 });
  }
}
