/**
 * Runs the benches on the built package and writes their figures to out/bench-*.json.
 *
 *     node test/bench/run.mjs [--quick] [--terrain NAME …] [--side CELLS …] [--runs N] [--core FILE]
 *
 * `--quick`: 1 and 4 million cells, 3 runs · `--core`: another build's dist/core/index.js, to compare two builds.
 */
import { pathToFileURL } from 'node:url';
import { runnerImport } from 'vite';

const given = process.argv.slice(2);
const at = given.indexOf('--core');
const [, file] = at < 0 ? [] : given.splice(at, 2);

const core = await import(file === undefined ? 'overbrim/core' : pathToFileURL(file).href).catch((error) => {
  console.error(`The built core cannot be loaded; run npm run build first. (${error.message})`);
  process.exit(1);
});
// Only the benches themselves are TypeScript run through a transformer; what they measure is the built package.
const bench = new URL('./survey-bench.ts', import.meta.url).pathname;
const { module } = await runnerImport(bench, { configFile: false, logLevel: 'error' });
await module.benchSurvey(core, given).catch((error) => {
  console.error(error.message);
  process.exitCode = 1;
});
