/**
 * Undoes TIFF prediction in place, row by row: 2 = horizontal differencing (TIFF 6.0, section 14), 3 = floating
 * point (TIFF Technical Note 3, 2005: bytes of a row sorted by significance, then differenced).
 * Works on values in the file's byte order, so that big-endian files come out right too.
 */
export function undoPredictor(
  bytes: Uint8Array,
  predictor: number,
  rowCells: number,
  width: number,
  littleEndian: boolean,
): void {
  const rowBytes = rowCells * width;
  const scratch = new Uint8Array(rowBytes);
  for (let start = 0; start + rowBytes <= bytes.length; start += rowBytes) {
    const row = bytes.subarray(start, start + rowBytes);
    if (predictor === 3) undoFloating(row, scratch, rowCells, width, littleEndian);
    else if (predictor === 2) undoDifferences(row, rowCells, width, littleEndian);
  }
}

function undoDifferences(row: Uint8Array, cells: number, width: number, littleEndian: boolean): void {
  const view = new DataView(row.buffer, row.byteOffset, row.byteLength);
  if (width === 1) for (let i = 1; i < cells; i++) row[i] += row[i - 1];
  else if (width === 2) {
    let sum = view.getUint16(0, littleEndian);
    for (let i = 1; i < cells; i++) {
      sum = (sum + view.getUint16(2 * i, littleEndian)) & 0xffff;
      view.setUint16(2 * i, sum, littleEndian);
    }
  } else if (width === 4) {
    let sum = view.getUint32(0, littleEndian);
    for (let i = 1; i < cells; i++) {
      sum = (sum + view.getUint32(4 * i, littleEndian)) >>> 0;
      view.setUint32(4 * i, sum, littleEndian);
    }
  } else {
    let sum = view.getBigUint64(0, littleEndian);
    for (let i = 1; i < cells; i++) {
      sum = BigInt.asUintN(64, sum + view.getBigUint64(8 * i, littleEndian));
      view.setBigUint64(8 * i, sum, littleEndian);
    }
  }
}

function undoFloating(
  row: Uint8Array,
  scratch: Uint8Array,
  cells: number,
  width: number,
  littleEndian: boolean,
): void {
  for (let i = 1; i < row.length; i++) row[i] += row[i - 1];
  scratch.set(row);
  for (let i = 0; i < cells; i++) {
    for (let byte = 0; byte < width; byte++) {
      const significance = littleEndian ? width - 1 - byte : byte;
      row[i * width + byte] = scratch[significance * cells + i];
    }
  }
}
