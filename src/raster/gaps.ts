import type { CellRect } from '../core/grid.ts';
import type { Part } from './mosaic.ts';

/** Widest strip between two tiles that counts as a gap and not as ground without data. */
export const widestGap = 3;

export interface Gap extends CellRect {
  readonly between: readonly [string, string];
}

/** The strips of 1 to 3 cells between tiles that no tile covers, corners where gaps cross included. */
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
      for (const bare of uncovered(rect, parts)) gaps.push({ ...bare, between: names });
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

/** Runs of rows of a rectangle in which no tile covers any cell. */
function uncovered(rect: CellRect, parts: readonly Part[]): CellRect[] {
  const over = parts.filter(
    (part) => part.column < rect.column + rect.width && part.column + part.width > rect.column,
  );
  const runs: CellRect[] = [];
  let start = rect.row;
  const end = rect.row + rect.height;
  for (let row = rect.row; row <= end; row++) {
    const bare = row < end && !over.some((part) => row >= part.row && row < part.row + part.height);
    if (bare) continue;
    if (row > start) runs.push({ ...rect, row: start, height: row - start });
    start = row + 1;
  }
  return runs;
}
