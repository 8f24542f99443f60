// Fills the invented town to the brim and traces an overflow through it: `npm start`.
import { existsSync, readFileSync } from 'node:fs';
import { relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { main } from 'overbrim/node';

const pathOf = (file) => fileURLToPath(new URL(file, import.meta.url));
if (!existsSync(pathOf('town/elevation.tif'))) await import('./town/make-town.mjs');

const { grid, underpass } = JSON.parse(readFileSync(pathOf('town/town.json'), 'utf8'));
const east = grid.west + (underpass.column + 0.5) * grid.cellM;
const north = grid.north - (underpass.row + 0.5) * grid.cellM;

await run('depressions', '--min-depth', '0.1');
await run('spill-path', '--from', `${east},${north}`);

/** Runs the command as typed below, its results in a folder that carries its name. */
async function run(id, ...options) {
  const terrain = relative('.', pathOf('town/elevation.tif'));
  const args = ['run', id, '--terrain', terrain, ...options, '--out', `out/town/${id}`];
  console.log(`\noverbrim ${args.join(' ')}`);
  const code = await main(args, process);
  if (code !== 0) process.exit(code);
}
