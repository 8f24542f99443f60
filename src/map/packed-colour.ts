/** Red, green, blue, 0…255 each. */
export type Rgb = readonly [number, number, number];

const isLittleEndian = new Uint8Array(Uint32Array.of(1).buffer)[0] === 1;

/** An opaque colour as one 32-bit value of a canvas's pixels. */
export function packed([red, green, blue]: Rgb): number {
  return isLittleEndian
    ? ((255 << 24) | (blue << 16) | (green << 8) | red) >>> 0
    : ((red << 24) | (green << 16) | (blue << 8) | 255) >>> 0;
}

/** The same for styles. */
export function css([red, green, blue]: Rgb, alpha = 1): string {
  return `rgba(${red}, ${green}, ${blue}, ${alpha})`;
}
