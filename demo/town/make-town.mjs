// Draws the invented town anew: `npm run build`, then `node demo/town/make-town.mjs [FOLDER]` (default: this one).
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { cloudOptimizedGeoTiff, crsFromEpsg, toCrs84 } from 'overbrim/raster';
import { runnerImport } from 'vite';

const here = dirname(fileURLToPath(import.meta.url));
const folder = process.argv[2] ?? here;
const load = (file) => runnerImport(join(here, file), { configFile: false, logLevel: 'error' });
const { townFiles } = (await load('town-files.ts')).module;
const { plan } = (await load('plan.ts')).module;

mkdirSync(folder, { recursive: true });
const crs = await crsFromEpsg(plan.epsg);
for (const [name, bytes] of townFiles(crs, { cloudOptimizedGeoTiff, toCrs84 })) {
  writeFileSync(join(folder, name), bytes);
  console.log(`${join(folder, name)}: ${bytes.length} bytes`);
}
