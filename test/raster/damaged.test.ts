import fc from 'fast-check';
import { expect, test } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { opened, ramp } from './open.ts';
import { degreesMetres, type TiffSpec, tiffBytes } from './tiff-builder.ts';

const seed = 20261201;
const base: TiffSpec = {
  width: 9,
  height: 7,
  values: ramp(9, 7),
  tags: { 42113: { type: 2, values: '-9999' } },
};
const files = [
  base,
  { ...base, littleEndian: false, rowsPerStrip: 2 },
  { ...base, big: true, tile: [16, 16] as const, deflate: true },
  {
    ...base,
    keys: degreesMetres,
    place: [0, 10, 1, 1] as const,
    overviews: [{ width: 4, height: 3, values: ramp(4, 3) }],
  },
].map(tiffBytes);

test(`2,400 damaged files are read or refused in a sentence (seed ${seed})`, async () => {
  const damage = fc.record({
    file: fc.nat(files.length - 1),
    changes: fc.array(fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.nat(255)), {
      minLength: 1,
      maxLength: 4,
    }),
    keep: fc.double({ min: 0.5, max: 1.4, noNaN: true }),
  });
  let refused = 0;
  await fc.assert(
    fc.asyncProperty(damage, async ({ file, changes, keep }) => {
      const bytes = files[file].slice(0, Math.ceil(files[file].length * Math.min(1, keep)));
      for (const [where, value] of changes)
        bytes[Math.min(bytes.length - 1, Math.floor(where * bytes.length))] = value;
      try {
        const { grid } = await opened([bytes]);
        expect(grid.elevationM).toHaveLength(grid.width * grid.height);
      } catch (error) {
        expect(error).toBeInstanceOf(OverbrimError);
        if (error instanceof OverbrimError) expect(error.message).toMatch(/^[^\n]{20,}\.$/);
        refused++;
      }
    }),
    { numRuns: 2400, seed },
  );
  expect(refused).toBeGreaterThan(400);
});
