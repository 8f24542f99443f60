// Builds the demo site into out/site: the town with modules by a bundler, and the plain page with one script tag.
import { copyFileSync, cpSync, existsSync, mkdirSync, readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const pathOf = (file) => fileURLToPath(new URL(file, import.meta.url));
const townFiles = ['elevation.tif', 'buildings.geojson', 'land-cover.geojson', 'streets.geojson'];

/** @param {string} folder where the site goes; emptied first */
export async function buildSite(folder) {
  if (!existsSync(pathOf('town/elevation.tif'))) await import('./town/make-town.mjs');
  await build({
    configFile: false,
    root: pathOf('.'),
    base: './',
    logLevel: 'error',
    publicDir: false,
    build: { outDir: folder, emptyOutDir: true, assetsInlineLimit: 0, chunkSizeWarningLimit: 1000 },
  });
  const town = join(folder, 'town');
  mkdirSync(town);
  for (const file of townFiles) copyFileSync(pathOf(`town/${file}`), join(town, file));
  copyPlainPage(join(folder, 'plain'));
}

/** The page of a town that knows no bundler: its own files, OpenLayers' full build, and ours beside them. */
function copyPlainPage(folder) {
  cpSync(pathOf('plain'), folder, { recursive: true });
  const dist = pathOf('../dist');
  const ours = readdirSync(dist).filter((file) => /^overbrim.*\.(js|json)$/.test(file));
  for (const file of [
    ...ours.map((name) => join(dist, name)),
    pathOf('../node_modules/ol/dist/ol.js'),
    pathOf('../node_modules/ol/ol.css'),
    pathOf('town/elevation.tif'),
  ]) {
    copyFileSync(file, join(folder, basename(file)));
  }
}
