/** Plain geometry of rings of vertices `row * (width + 1) + column`, closed (last = first), to judge outlines by. */

/** Area by the shoelace formula in cells, positive for a ring that is counter-clockwise in a north-up view. */
export function ringArea(ring: readonly number[], width: number): number {
  let twice = 0;
  for (let i = 1; i < ring.length; i++) {
    const [x0, y0] = place(ring[i - 1], width);
    const [x1, y1] = place(ring[i], width);
    twice += x0 * y1 - x1 * y0;
  }
  return twice / 2;
}

/** Column and row of a vertex, rows counted upwards as on a north-up map. */
function place(vertex: number, width: number): [number, number] {
  return [vertex % (width + 1), -Math.floor(vertex / (width + 1))];
}

/** Cells whose centre lies inside by the even-odd rule, ascending: crossings of the ray to the west. */
export function cellsInside(rings: readonly (readonly number[])[], width: number, height: number): number[] {
  const inside: number[] = [];
  for (let cell = 0; cell < width * height; cell++) {
    const x = (cell % width) + 0.5;
    const y = -Math.floor(cell / width) - 0.5;
    let crossings = 0;
    for (const ring of rings) {
      for (let i = 1; i < ring.length; i++) {
        const [x0, y0] = place(ring[i - 1], width);
        const [x1, y1] = place(ring[i], width);
        if (x0 === x1 && x0 < x && Math.min(y0, y1) < y && y < Math.max(y0, y1)) crossings++;
      }
    }
    if (crossings % 2 === 1) inside.push(cell);
  }
  return inside;
}

/** All vertices that a ring passes, one cell side apart, the closing one left out; throws on a slanted stretch. */
export function unitSteps(ring: readonly number[], width: number): number[] {
  const across = width + 1;
  const passed: number[] = [];
  for (let i = 1; i < ring.length; i++) {
    const sameRow = Math.floor(ring[i] / across) === Math.floor(ring[i - 1] / across);
    const sameColumn = ring[i] % across === ring[i - 1] % across;
    if (sameRow === sameColumn)
      throw new Error(`Ring runs from ${ring[i - 1]} to ${ring[i]}, not along cell sides.`);
    const step = Math.sign(ring[i] - ring[i - 1]) * (sameRow ? 1 : across);
    for (let vertex = ring[i - 1]; vertex !== ring[i]; vertex += step) passed.push(vertex);
  }
  return passed;
}

/** Whether cells hang together by their sides alone. */
export function isConnected(cells: readonly number[], width: number): boolean {
  const left = new Set(cells);
  const queue = cells.slice(0, 1);
  left.delete(queue[0]);
  for (const cell of queue) {
    const beside = [cell - width, cell + width];
    if (cell % width > 0) beside.push(cell - 1);
    if (cell % width < width - 1) beside.push(cell + 1);
    for (const other of beside) if (left.delete(other)) queue.push(other);
  }
  return left.size === 0;
}
