import type { CellRect } from '../core/grid.ts';
import type { Part } from './mosaic.ts';

/** Widest strip between two tiles that counts as a gap and not as ground without data. */
export const widestGap = 3;

export interface Gap extends CellRect {
  readonly between: readonly [string, string];
}

/** The strips of 1 to 3 cells between tiles that no tile covers, corners where gaps cross included once. */
export function gapsBetween(parts: readonly Part[]): Gap[] {
  const gaps: Gap[] = [];
  for (let i = 0; i < parts.length; i++) {
    for (let j = i + 1; j < parts.length; j++) {
      const columns = between(parts[i].column, parts[i].width, parts[j].column, parts[j].width);
      const rows = between(parts[i].row, parts[i].height, parts[j].row, parts[j].height);
      if ((!columns.gap && !rows.gap) || columns.size <= 0 || rows.size <= 0) continue;
      if ((columns.gap && columns.size > widestGap) || (rows.gap && rows.size > widestGap)) continue;
      const rect = { column: columns.at, width: columns.size, row: rows.at, height: rows.size };
      const names = [parts[i].file.reader.name, parts[j].file.reader.name] as const;
      // Where gaps cross, several pairs of tiles see the corner: it is told with the first.
      let bare: CellRect[] = [rect];
      for (const taken of [...parts, ...gaps]) bare = bare.flatMap((left) => outside(left, taken));
      for (const strip of bare) gaps.push({ ...strip, between: names });
    }
  }
  return gaps;
}

/** What two ranges share, or the gap between them. */
function between(
  a: number,
  aSize: number,
  b: number,
  bSize: number,
): { at: number; size: number; gap: boolean } {
  const start = Math.max(a, b);
  const end = Math.min(a + aSize, b + bSize);
  return start < end
    ? { at: start, size: end - start, gap: false }
    : { at: end, size: start - end, gap: true };
}

/** The parts of a rectangle that lie outside another, as up to four rectangles. */
function outside(rect: CellRect, other: CellRect): CellRect[] {
  const left = Math.max(rect.column, other.column);
  const right = Math.min(rect.column + rect.width, other.column + other.width);
  const top = Math.max(rect.row, other.row);
  const bottom = Math.min(rect.row + rect.height, other.row + other.height);
  if (left >= right || top >= bottom) return [rect];
  const middle = { row: top, height: bottom - top };
  return [
    { ...rect, height: top - rect.row },
    { ...middle, column: rect.column, width: left - rect.column },
    { ...middle, column: right, width: rect.column + rect.width - right },
    { ...rect, row: bottom, height: rect.row + rect.height - bottom },
  ].filter(({ width, height }) => width > 0 && height > 0);
}
