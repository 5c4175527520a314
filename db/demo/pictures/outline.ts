export type Point = readonly [number, number];

/** A closed smooth curve through the points (Catmull-Rom), `steps` pieces between neighbours. */
export function smoothLoop(points: readonly Point[], steps = 8): Point[] {
  const count = points.length;
  const corner = (index: number): Point => points[(index + count) % count] ?? [0, 0];
  return points.flatMap((_, index) => {
    const [a, b, c, d] = [corner(index - 1), corner(index), corner(index + 1), corner(index + 2)];
    return Array.from({ length: steps }, (_, step): Point => {
      const t = step / steps;
      return [spline(a[0], b[0], c[0], d[0], t), spline(a[1], b[1], c[1], d[1], t)];
    });
  });
}

/** An open smooth curve through the points. */
export function smoothPath(points: readonly Point[], steps = 8): Point[] {
  const first = points[0] ?? [0, 0];
  const last = points[points.length - 1] ?? first;
  return [...smoothLoop([first, ...points, last], steps).slice(steps, -2 * steps), last];
}

function spline(a: number, b: number, c: number, d: number, t: number): number {
  return b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)));
}

/** A rectangle about the origin with rounded corners (cm). */
export function roundedRect(lengthX: number, lengthY: number, radius: number, steps = 4): Point[] {
  const r = Math.min(radius, lengthX / 2 - 0.001, lengthY / 2 - 0.001);
  const centres: Point[] = [
    [lengthX / 2 - r, lengthY / 2 - r],
    [-lengthX / 2 + r, lengthY / 2 - r],
    [-lengthX / 2 + r, -lengthY / 2 + r],
    [lengthX / 2 - r, -lengthY / 2 + r],
  ];
  return centres.flatMap(([cx, cy], quarter) =>
    Array.from({ length: steps + 1 }, (_, step): Point => {
      const angle = ((quarter + step / steps) * Math.PI) / 2;
      return [cx + r * Math.cos(angle), cy + r * Math.sin(angle)];
    }),
  );
}

export const circle = (radius: number, steps = 28): Point[] =>
  Array.from({ length: steps }, (_, step): Point => {
    const angle = (step / steps) * 2 * Math.PI;
    return [radius * Math.cos(angle), radius * Math.sin(angle)];
  });

export const shifted = (points: readonly Point[], dx: number, dy: number, turnDegrees = 0): Point[] => {
  const [c, s] = [Math.cos((turnDegrees * Math.PI) / 180), Math.sin((turnDegrees * Math.PI) / 180)];
  return points.map(([x, y]) => [x * c - y * s + dx, x * s + y * c + dy]);
};

/** The same loop, run anticlockwise. */
export function anticlockwise(loop: readonly Point[]): readonly Point[] {
  const twiceArea = loop.reduce((sum, [x, y], index) => {
    const [nx, ny] = loop[(index + 1) % loop.length] ?? [0, 0];
    return sum + x * ny - nx * y;
  }, 0);
  return twiceArea < 0 ? [...loop].reverse() : loop;
}

/** True for a loop without dents, such as a rectangle or a circle. */
export function isConvex(loop: readonly Point[]): boolean {
  return loop.every(([bx, by], index) => {
    const [ax, ay] = loop[(index + loop.length - 1) % loop.length] ?? [0, 0];
    const [cx, cy] = loop[(index + 1) % loop.length] ?? [0, 0];
    return (bx - ax) * (cy - by) - (by - ay) * (cx - bx) >= -1e-6;
  });
}

/** A loop moved in from itself by a small distance, cm. */
export function outlineInset(loop: readonly Point[], inset: number): Point[] {
  const run = anticlockwise(loop);
  const normals = loopNormals(run);
  return run.map(([x, y], index) => {
    const [nx, ny] = normals[index] ?? [0, 0];
    return [x - nx * inset, y - ny * inset];
  });
}

/** Outward unit normals at each point of a loop that runs anticlockwise. */
export function loopNormals(loop: readonly Point[]): Point[] {
  const count = loop.length;
  return loop.map((_, index) => {
    const [px, py] = loop[(index + count - 1) % count] ?? [0, 0];
    const [nx, ny] = loop[(index + 1) % count] ?? [0, 0];
    const length = Math.hypot(nx - px, ny - py) || 1;
    return [(ny - py) / length, (px - nx) / length];
  });
}

/** Distance from a point to a loop, positive inside. */
export function depthInside(loop: readonly Point[], x: number, y: number): number {
  let nearest = Infinity;
  let inside = false;
  let [ax, ay] = loop[loop.length - 1] ?? [0, 0];
  for (const [bx, by] of loop) {
    const [ex, ey] = [bx - ax, by - ay];
    const t = Math.min(1, Math.max(0, ((x - ax) * ex + (y - ay) * ey) / (ex * ex + ey * ey || 1)));
    const [qx, qy] = [x - ax - t * ex, y - ay - t * ey];
    nearest = Math.min(nearest, qx * qx + qy * qy);
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * ex) inside = !inside;
    [ax, ay] = [bx, by];
  }
  return inside ? Math.sqrt(nearest) : -Math.sqrt(nearest);
}
