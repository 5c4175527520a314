import { moveBuilds } from '@/db/queries/floor-moves';
import { writeRoute } from '@/lib/route';
import { movesBody } from '@/lib/validation/floor';

export const POST = writeRoute(movesBody, 'manage', ({ viewer, input }) => moveBuilds(viewer, input, Date.now()));
