/** A layer's extent as a CSS clip path in the viewport's pixels, rotation included; `none` without an extent. */
export function clipPolygon(
  extent: readonly number[] | undefined,
  coordinateToPixel: readonly number[],
): string {
  if (!extent) return 'none';
  const [west, south, east, north] = extent;
  const [a, b, c, d, e, f] = coordinateToPixel;
  const corner = (x: number, y: number) => `${a * x + c * y + e}px ${b * x + d * y + f}px`;
  const corners = [corner(west, south), corner(west, north), corner(east, north), corner(east, south)];
  return `polygon(${corners.join(', ')})`;
}
