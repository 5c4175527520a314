import { sendJson, type Refused } from '@/lib/send-json';

export type MovedBuild = { orderNumber: string; moveId: string; stageName: string };
export type LeftBuild = { orderNumber: string; why: string };

export type MoveWish = {
  moves: { orderNumber: string; toStageKey: string }[];
  rack?: string | null;
  reason?: string;
};

export type MoveAnswer = { ok: true; moved: MovedBuild[]; left: LeftBuild[] } | { ok: false; refused: Refused };

function listIn<T>(answer: unknown, name: string, isOne: (row: unknown) => row is T): T[] {
  if (typeof answer !== 'object' || answer === null) return [];
  const list: unknown = Object.entries(answer).find(([key]) => key === name)?.[1];
  return Array.isArray(list) ? list.filter(isOne) : [];
}

const has = (row: unknown, ...names: string[]): row is Record<string, unknown> =>
  typeof row === 'object' && row !== null && names.every((name) => typeof Reflect.get(row, name) === 'string');
const isMoved = (row: unknown): row is MovedBuild => has(row, 'orderNumber', 'moveId', 'stageName');
const isLeft = (row: unknown): row is LeftBuild => has(row, 'orderNumber', 'why');

const key = () => crypto.randomUUID();

/** Moves builds on, or back with a reason. Sent again it moves nothing twice. */
export async function sendMoves(wish: MoveWish): Promise<MoveAnswer> {
  const sent = await sendJson('/api/floor/moves', { idempotencyKey: key(), ...wish });
  if (!sent.ok) return sent;
  return { ok: true, moved: listIn(sent.answer, 'moved', isMoved), left: listIn(sent.answer, 'left', isLeft) };
}

/** Takes moves back. @returns those that stay moved, each with a sentence */
export async function sendUndo(moved: MovedBuild[]): Promise<MoveAnswer> {
  const moves = moved.map(({ orderNumber, moveId }) => ({ orderNumber, moveId }));
  const sent = await sendJson('/api/floor/moves/undo', { idempotencyKey: key(), moves });
  return sent.ok ? { ok: true, moved: [], left: listIn(sent.answer, 'left', isLeft) } : sent;
}
