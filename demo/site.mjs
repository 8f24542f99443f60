// Builds the demo site into out/site: the town with modules by a bundler, and the plain page with one script tag.
import { copyFileSync, cpSync, existsSync, mkdirSync, readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';

const pathOf = (file) => fileURLToPath(new URL(file, import.meta.url));
const townFiles = ['elevation.tif', 'buildings.geojson', 'land-cover.geojson', 'streets.geojson'];

/**
 * @param {string} folder where the site goes; emptied first
 * @param {{ openLayers?: string }} [options] package of node_modules to take OpenLayers from
 */
export async function buildSite(folder, { openLayers = 'ol' } = {}) {
  if (!existsSync(pathOf('town/elevation.tif'))) await import('./town/make-town.mjs');
  const modules = pathOf('../node_modules');
  await build({
    configFile: false,
    root: pathOf('.'),
    base: './',
    logLevel: 'error',
    publicDir: false,
    resolve: { alias: [{ find: /^ol(?=\/)/, replacement: join(modules, openLayers) }] },
    build: { outDir: folder, emptyOutDir: true, assetsInlineLimit: 0, chunkSizeWarningLimit: 1000 },
  });
  const town = join(folder, 'town');
  mkdirSync(town);
  for (const file of townFiles) copyFileSync(pathOf(`town/${file}`), join(town, file));
  copyPlainPage(join(folder, 'plain'), join(modules, openLayers));
}

/** The page of a town that knows no bundler: its own files, OpenLayers' full build, and ours beside them. */
function copyPlainPage(folder, openLayers) {
  cpSync(pathOf('plain'), folder, { recursive: true });
  const dist = pathOf('../dist');
  const ours = readdirSync(dist).filter((file) => /^overbrim.*\.(js|json)$/.test(file));
  for (const file of [
    ...ours.map((name) => join(dist, name)),
    join(openLayers, 'dist/ol.js'),
    join(openLayers, 'ol.css'),
    pathOf('town/elevation.tif'),
  ]) {
    copyFileSync(file, join(folder, basename(file)));
  }
}
