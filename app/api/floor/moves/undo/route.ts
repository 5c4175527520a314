import { undoMoves } from '@/db/queries/floor-moves';
import { writeRoute } from '@/lib/route';
import { undoBody } from '@/lib/validation/floor';

export const POST = writeRoute(undoBody, 'manage', ({ viewer, input }) => undoMoves(viewer, input, Date.now()));
