import type { Georeference, Notice } from './terrain.ts';

/** The deepest sea floor lies at about −10,990 m, the highest summit at 8849 m (common knowledge): some margin on both. */
const lowestM = -12_000;
const highestM = 9_000;

/** Says which cells hold what no ground on Earth has, most likely a no-data value that was not declared. */
export function absurdNotices(elevationM: Float32Array, width: number, place: Georeference): Notice[] {
  let worst = -1;
  let count = 0;
  for (let i = 0; i < elevationM.length; i++) {
    const z = elevationM[i];
    if (!(z < lowestM || z > highestM)) continue;
    count++;
    if (worst < 0 || Math.abs(z) > Math.abs(elevationM[worst])) worst = i;
  }
  if (count === 0) return [];
  const column = worst % width;
  const row = Math.floor(worst / width);
  const x = place.west + (column + 0.5) * place.cellWidth;
  const y = place.north - (row + 0.5) * place.cellHeight;
  const others = count === 1 ? '' : ` (${count} cells are below ${lowestM} or above ${highestM} m)`;
  return [
    {
      kind: 'absurd-value',
      message:
        `The elevation at column ${column}, row ${row} (${x} east, ${y} north) is ${text(elevationM[worst])} m${others}, ` +
        'which no ground on Earth has; it is taken as ground all the same, so declare the value as no-data in the file if it stands for a void.',
    },
  ];
}

/** Few digits, since float32 has seven. */
function text(z: number): string {
  return `${Number(z.toPrecision(7))}`;
}
