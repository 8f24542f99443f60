import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { basin } from '../../demo/town/basin.ts';
import { culverts } from '../../demo/town/culverts.ts';
import { townElevation } from '../../demo/town/elevation.ts';
import { plan, railwayY } from '../../demo/town/plan.ts';
import { quarryPonds } from '../../demo/town/quarry.ts';
import { townFiles } from '../../demo/town/town-files.ts';
import { townTruths } from '../../demo/town/truths.ts';
import { crsFromEpsg } from '../../src/raster/crs.ts';
import { toCrs84 } from '../../src/raster/transform.ts';
import { cloudOptimizedGeoTiff } from '../../src/raster/write-cog.ts';

const { size } = plan;
const z = townElevation();
const folder = fileURLToPath(new URL('../../demo/town/', import.meta.url));

/** Ground lower than `level` that hangs together with one cell over eight neighbours, and the lowest rim of it. */
function pool(column: number, row: number, level: number) {
  const seen = new Set([row * size + column]);
  const stack = [...seen];
  let volume = 0;
  let lowest = Number.POSITIVE_INFINITY;
  let lowestRim = Number.POSITIVE_INFINITY;
  for (let cell = stack.pop(); cell !== undefined; cell = stack.pop()) {
    volume += level - z[cell];
    lowest = Math.min(lowest, z[cell]);
    for (const step of [-size - 1, -size, -size + 1, -1, 1, size - 1, size, size + 1]) {
      const next = cell + step;
      if (z[next] >= level) lowestRim = Math.min(lowestRim, z[next]);
      else if (!seen.has(next)) {
        seen.add(next);
        stack.push(next);
      }
    }
  }
  return { area: seen.size, volume, lowest, lowestRim };
}

describe('the invented town', () => {
  it('is drawn again byte for byte as it lies in the repository', async () => {
    const files = townFiles(await crsFromEpsg(plan.epsg), { cloudOptimizedGeoTiff, toCrs84 });
    expect([...files.keys()]).toHaveLength(6);
    for (const [name, bytes] of files) {
      expect(Buffer.compare(readFileSync(folder + name), bytes), name).toBe(0);
    }
  }, 60_000);

  it.each(quarryPonds())('quarry: $name holds what its prisms give', (pond) => {
    const found = pool(pond.pit.column, pond.pit.row, pond.spillElevationM);
    expect(found).toEqual({
      area: pond.areaM2,
      volume: pond.capacityM3,
      lowest: pond.pitElevationM,
      lowestRim: pond.spillElevationM,
    });
  });

  it('has a basin that holds, up to its weir, what its drawing gives', () => {
    const { capacityM3, weirM, floorM } = townTruths().basin;
    const found = pool(basin.x, basin.y, weirM);
    expect(found.volume).toBe(capacityM3);
    expect(found.lowest).toBe(floorM);
    expect(found.lowestRim).toBe(weirM);
  });

  it('has ground at the places named in town.json that is as high as stated', () => {
    const { levee, underpass, embankment, river } = townTruths();
    const at = (place: { column: number; row: number }) => z[place.row * size + place.column];
    expect(at(levee.lowPlace)).toBe(levee.lowPlace.elevationM);
    expect(at(underpass)).toBe(underpass.bottomM);
    expect(at(embankment)).toBe(embankment.lowestCrestM);
    expect(at(river.inflow)).toBe(river.inflow.bedM);
    expect(at(river.outflow)).toBe(river.outflow.bedM);
  });

  it('lets each culvert pass below higher ground, from a higher end to a lower', () => {
    for (const { name, under, line, inletInvertM, outletInvertM } of culverts()) {
      const [ends, middle] = [
        line.map(([x, y]) => z[Math.floor(y) * size + Math.floor(x)]),
        line.map((point) => point).reduce(([ax, ay], [bx, by]) => [(ax + bx) / 2, (ay + by) / 2]),
      ];
      const y = under === 'railway' ? railwayY(middle[0]) : middle[1];
      const top = z[Math.floor(y) * size + Math.floor(middle[0])];
      expect(inletInvertM, name).toBeGreaterThan(outletInvertM);
      expect(Math.abs(ends[0] - inletInvertM), name).toBeLessThan(0.5);
      expect(Math.abs(ends[1] - outletInvertM), name).toBeLessThan(0.5);
      expect(top, name).toBeGreaterThan(Math.max(...ends) + 0.3);
    }
  });
});
