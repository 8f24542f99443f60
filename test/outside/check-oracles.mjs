/**
 * Recomputes the recorded answers of other libraries, and lets an independent raster library read what our command
 * line makes of the same terrains. `npm run oracles` builds first and then runs this.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileSource } from 'overbrim/node';
import { cloudOptimizedGeoTiff, openTerrain } from 'overbrim/raster';

const here = (path) => new URL(path, import.meta.url).pathname;
const command = here('../../dist/node/bin.js');
const folder = mkdtempSync(join(tmpdir(), 'overbrim-oracles-'));

try {
  const terrains = {
    olinda: [here('../data/olinda_dem_utm25s.tif')],
    volcano: [await volcanoFile()],
    etopo60: [here('../data/etopo60.tif'), '--outlets', 'deepest'],
  };
  const levels = [];
  for (const [name, given] of Object.entries(terrains)) {
    for (const neighbours of ['8', '4']) {
      const out = join(folder, `${name}-${neighbours}`);
      execFileSync(process.execPath, [
        ...[command, 'run', 'depressions', '--terrain', ...given],
        ...['--vertical-unit', 'm', '--neighbours', neighbours, '--out', out, '--json'],
      ]);
      levels.push(`${name}-${neighbours}=${join(out, 'brim-level.tif')}`);
    }
  }
  const { status } = spawnSync(process.execPath, [here('oracles/run.mjs'), '--levels', ...levels], {
    stdio: 'inherit',
  });
  process.exitCode = status ?? 1;
} finally {
  rmSync(folder, { recursive: true, force: true });
}

/** The volcano has no file of its own: its heights go into one, at a place that stands for none. */
async function volcanoFile() {
  const relief = new URL('../../node_modules/vega-datasets/data/volcano.json', import.meta.url);
  const { width, height, values } = JSON.parse(readFileSync(relief, 'utf8'));
  const source = await fileSource(here('../data/olinda_dem_utm25s.tif'));
  const { georeference } = await openTerrain([source], { verticalUnit: 'm' });
  const bytes = cloudOptimizedGeoTiff({
    width,
    height,
    samples: Float32Array.from(values),
    noData: null,
    georeference: { ...georeference, cellWidth: 10, cellHeight: 10 },
  });
  const path = join(folder, 'volcano.tif');
  writeFileSync(path, bytes);
  return path;
}
