/** A place on a drawing, in mm. */
export type Point = { x: number; y: number };

/** All points with a x + b y = c. */
export type Line = { a: number; b: number; c: number };

export function lineThrough(p: Point, q: Point): Line {
  const [a, b] = [q.y - p.y, p.x - q.x];
  return { a, b, c: a * p.x + b * p.y };
}

/** Where two lines cross. @throws RangeError when they are parallel */
export function crossing(l: Line, m: Line): Point {
  const determinant = l.a * m.b - m.a * l.b;
  if (determinant === 0) throw new RangeError('Parallel lines do not cross.');
  return { x: (l.c * m.b - m.c * l.b) / determinant, y: (l.a * m.c - m.a * l.c) / determinant };
}

/** The point a share of the way from p to q. */
export function between(p: Point, q: Point, share: number): Point {
  return { x: p.x + (q.x - p.x) * share, y: p.y + (q.y - p.y) * share };
}
