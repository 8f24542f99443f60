/** Where a canvas lies on the screen and where each of its samples lies in the view. */
export interface CanvasFrame {
  /** Samples across and down; one a device pixel, or one every `step` of them. */
  readonly width: number;
  readonly height: number;
  readonly step: number;
  /** Place and size in the map's viewport, CSS pixels, all on whole device pixels. */
  readonly left: number;
  readonly top: number;
  readonly cssWidth: number;
  readonly cssHeight: number;
  /** Sample numbers (i, j) to the view's coordinates: x = a·i + c·j + e, y = b·i + d·j + f, at the sample's centre. */
  readonly toView: readonly [number, number, number, number, number, number];
}

/** A part of a device pixel that rounding of page coordinates may cost. */
const exact = 1e-3;

/**
 * Covers a viewport with whole device pixels, since a canvas that straddles them is blurred and a pixel off.
 * @param rect the viewport on the page, CSS pixels
 * @param pixelToCoordinate affine of CSS pixels in the viewport to the view's coordinates, rotation included
 */
export function canvasFrame(
  rect: Readonly<{ left: number; top: number; width: number; height: number }>,
  devicePixelRatio: number,
  pixelToCoordinate: readonly number[],
  step: number,
): CanvasFrame {
  const x0 = Math.floor(rect.left * devicePixelRatio + exact);
  const y0 = Math.floor(rect.top * devicePixelRatio + exact);
  const x1 = Math.ceil((rect.left + rect.width) * devicePixelRatio - exact);
  const y1 = Math.ceil((rect.top + rect.height) * devicePixelRatio - exact);
  const width = Math.max(0, Math.ceil((x1 - x0) / step));
  const height = Math.max(0, Math.ceil((y1 - y0) / step));
  const left = x0 / devicePixelRatio - rect.left;
  const top = y0 / devicePixelRatio - rect.top;
  const size = step / devicePixelRatio;
  const [a, b, c, d, e, f] = pixelToCoordinate;
  const x = left + size / 2;
  const y = top + size / 2;
  return {
    width,
    height,
    step,
    left,
    top,
    cssWidth: width * size,
    cssHeight: height * size,
    toView: [a * size, b * size, c * size, d * size, a * x + c * y + e, b * x + d * y + f],
  };
}
