// Prints the size of each script, plain and as it travels, and fails when the first download is larger than its goal:
// `npm run size`, after a build.
import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';

/** Goals for the first download, without OpenLayers, kB (1000 bytes) of gzip. */
const goalsKB = { 'overbrim.js': 170 };

const dist = resolve(fileURLToPath(import.meta.url), '../../../dist');
const files = readdirSync(dist).filter((file) => /^overbrim.*\.(js|json)$/.test(file));
const kB = (bytes) => (bytes / 1000).toFixed(1).padStart(9);

console.log(`${'file'.padEnd(32)} ${'plain kB'.padStart(9)} ${'gzip kB'.padStart(9)}   goal`);
let tooLarge = 0;
for (const file of files.sort()) {
  const bytes = readFileSync(join(dist, file));
  const zipped = gzipSync(bytes, { level: 9 }).length;
  const goal = goalsKB[file];
  if (goal !== undefined && zipped > goal * 1000) tooLarge++;
  console.log(`${file.padEnd(32)} ${kB(bytes.length)} ${kB(zipped)}   ${goal ?? ''}`);
}
const missing = Object.keys(goalsKB).filter((file) => !files.includes(file));
if (missing.length > 0) console.error(`dist has no ${missing.join(', ')}; run npm run build first.`);
if (tooLarge > 0) console.error('A first download is larger than its goal; make parts of it lazy.');
process.exitCode = missing.length > 0 || tooLarge > 0 ? 1 : 0;
