import type { Place, PondOnView } from './pond-features.ts';

/**
 * Which way a pond overflows: from its pour point to the nearest shore of the next pond, or, where none follows,
 * away from its own water. Radians clockwise from the view's north; null without a pour point.
 */
export function overflowBearing({ pourPoint, spillsInto, outline, inside }: PondOnView): number | null {
  if (pourPoint === null) return null;
  const shore = (of: PondOnView['outline']): Place | null => {
    const nearest = of.getGeometry()?.getClosestPoint([...pourPoint]);
    return nearest ? [nearest[0], nearest[1]] : null;
  };
  if (spillsInto)
    return bearing(pourPoint, shore(spillsInto.outline)) ?? bearing(pourPoint, spillsInto.inside);
  return bearing(shore(outline), pourPoint) ?? bearing(inside, pourPoint);
}

/**
 * The line of a link, from a pond's pour point to the inside of the next pond: it leaves straight away from the own
 * water and bends over (quadratic Bézier curve). Null where nothing follows.
 */
export function linkLine({ pourPoint, spillsInto, inside }: PondOnView, pieces = 24): Place[] | null {
  if (pourPoint === null || spillsInto === null) return null;
  const [x, y] = pourPoint;
  const [toX, toY] = spillsInto.inside;
  const away = Math.hypot(x - inside[0], y - inside[1]);
  const span = Math.hypot(toX - x, toY - y);
  const reach = away > 0 ? (0.25 * span) / away : 0;
  const viaX = x + (x - inside[0]) * reach;
  const viaY = y + (y - inside[1]) * reach;
  const at = (t: number, a: number, b: number, c: number) =>
    (1 - t) ** 2 * a + 2 * t * (1 - t) * b + t * t * c;
  return Array.from({ length: pieces + 1 }, (_, piece) => {
    const t = piece / pieces;
    return [at(t, x, viaX, toX), at(t, y, viaY, toY)];
  });
}

/** Radians clockwise from north; null where both places are one. */
export function bearing(from: Place | null, to: Place | null): number | null {
  if (from === null || to === null) return null;
  const dx = to[0] - from[0];
  const dy = to[1] - from[1];
  return dx === 0 && dy === 0 ? null : Math.atan2(dx, dy);
}
