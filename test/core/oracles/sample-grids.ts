import type { SmallGrid, SmallOutlet } from './small-grid.ts';

const void_ = Number.NaN;

/** A grid from rows of text: whole numbers, `.` = void. Water leaves over all cells on the rim unless told. */
export function gridFromText(text: string, given: Partial<SmallGrid> = {}): SmallGrid {
  const rows = text
    .trim()
    .split('\n')
    .map((row) => row.trim().split(/\s+/));
  const width = rows[0].length;
  const height = rows.length;
  const z = Float32Array.from(rows.flat(), (word) => (word === '.' ? void_ : Number(word)));
  return { width, height, z, neighbours: 8, wraps: false, outlets: rim(width, height), ...given };
}

/** All cells on the rim as outlets at ground level. */
export function rim(width: number, height: number): SmallOutlet[] {
  const outlets: SmallOutlet[] = [];
  for (let cell = 0; cell < width * height; cell++) {
    const row = Math.floor(cell / width);
    const column = cell % width;
    if (row === 0 || row === height - 1 || column === 0 || column === width - 1) {
      outlets.push({ cell, levelM: Number.NEGATIVE_INFINITY });
    }
  }
  return outlets;
}
