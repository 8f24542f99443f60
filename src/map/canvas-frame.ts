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

/** A part of a CSS pixel that rounding of page coordinates may cost. */
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
  const grain = wholeGrain(devicePixelRatio);
  const before = (side: number): number => Math.floor((side + exact) / grain) * grain;
  const beyond = (side: number): number => Math.ceil((side - exact) / grain) * grain;
  const left = before(rect.left) - rect.left;
  const top = before(rect.top) - rect.top;
  const across = Math.round((beyond(rect.left + rect.width) - before(rect.left)) * devicePixelRatio);
  const down = Math.round((beyond(rect.top + rect.height) - before(rect.top)) * devicePixelRatio);
  const width = Math.max(0, Math.ceil(across / step));
  const height = Math.max(0, Math.ceil(down / step));
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

/**
 * The least length on which device and CSS pixels agree, CSS pixels. Browsers snap to the one or to the other (under
 * an emulated pixel ratio); on their common grid both leave the canvas as it is.
 */
function wholeGrain(devicePixelRatio: number): number {
  for (let grain = 1; grain <= 10; grain++) {
    const pixels = grain * devicePixelRatio;
    if (Math.abs(pixels - Math.round(pixels)) < 1e-3) return grain;
  }
  return 1 / devicePixelRatio;
}
