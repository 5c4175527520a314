import type { Grounds } from '../schedule/window-moves';

/** A day off inside a window, with the day by which it is past. */
export type KeptClosure = { name: string; endsOn: string };

/** What a window rested on, as it is kept beside it. */
export type KeptGrounds = Omit<Grounds, 'closures'> & { closures: KeptClosure[] };
