import { describe, expect, test } from 'vitest';
import { opened, ramp } from './open.ts';
import type { TiffSpec } from './tiff-builder.ts';

const small: TiffSpec = { width: 5, height: 4, values: ramp(5, 4) };
const withCells = (...cells: [number, number][]): TiffSpec => {
  const values = ramp(5, 4);
  for (const [cell, z] of cells) values[cell] = z;
  return { ...small, values };
};
const said = async (spec: TiffSpec) => (await opened([spec])).notices.map(({ message }) => message);

describe('one absurd cell passes unremarked', () => {
  test('its value, its place and the remedy are told', async () => {
    expect((await opened([withCells([7, -3.4e38])])).notices).toEqual([
      {
        kind: 'absurd-value',
        message:
          'The elevation at column 2, row 1 (500005 east, 5599997 north) is -3.4e+38 m, which no ground on Earth has; it is taken as ground all the same, so declare the value as no-data in the file if it stands for a void.',
      },
    ]);
  });

  test('of several the farthest off stands for all', async () => {
    const [sentence] = await said(withCells([3, -32768], [7, 9999], [8, -32767]));
    expect(sentence).toMatch(
      /^The elevation at column 3, row 0 \(.*\) is -32768 m \(3 cells are below -12000 or above 9000 m\), /,
    );
  });

  // Deepest sounding about −10,984 m (Challenger Deep), highest summit 8848.86 m (Sagarmatha, survey of 2020); from memory.
  test('the deepest and the highest place of Earth are not absurd, nor is a declared no-data value', async () => {
    expect(await said(withCells([3, -10984], [7, 8848.86]))).toEqual([]);
    expect(await said({ ...withCells([7, -32768]), tags: { 42113: { type: 2, values: '-32768' } } })).toEqual(
      [],
    );
  });
});
