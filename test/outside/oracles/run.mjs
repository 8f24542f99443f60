/**
 * Recomputes the recorded answers of general-purpose libraries (image morphology, sparse graphs, image labelling) and
 * compares them.
 *
 *     node test/outside/oracles/run.mjs                          compare, exit 1 on a difference
 *     node test/outside/oracles/run.mjs --record                 write test/outside/recorded/
 *     node test/outside/oracles/run.mjs --levels NAME=FILE …     also compare rasters of brim levels written by our
 *                                                                build, as an independent raster library reads them,
 *                                                                with the recorded NAME (olinda-8, etopo60-4, …)
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { firstDifference } from './difference.mjs';
import { missingLibraries, python } from './python.mjs';

const answers = [
  ...['olinda', 'volcano', 'etopo60'].flatMap((terrain) =>
    ['8', '4'].map((neighbours) => ({
      name: `${terrain}-${neighbours}`,
      script: 'brim_levels.py',
      given: [terrain, neighbours],
    })),
  ),
  { name: 'sea-floor', script: 'sea_floor.py', given: [] },
];

const recordedAt = (name) => new URL(`../recorded/${name}.json`, import.meta.url);
const recorded = (name) => JSON.parse(readFileSync(recordedAt(name), 'utf8'));

const options = { record: { type: 'boolean', default: false }, levels: { type: 'boolean', default: false } };
const { values, positionals } = parseArgs({ options, allowPositionals: true });

const missing = missingLibraries();
if (missing !== null) {
  console.error(missing);
  process.exit(1);
}
const failures = [...answers.flatMap(compared), ...(values.levels ? readBack(positionals) : [])];
for (const failure of failures) console.error(failure);
process.exitCode = failures.length > 0 ? 1 : 0;

/** Sentences about what differs from the record. */
function compared({ name, script, given }) {
  const text = python(script, given);
  if (values.record) {
    writeFileSync(recordedAt(name), text);
    console.log(`${name}: recorded`);
    return [];
  }
  const found = firstDifference(withoutLibraries(recorded(name)), withoutLibraries(JSON.parse(text)));
  console.log(`${name}: ${found === null ? 'as recorded' : 'differs'}`);
  return found === null ? [] : [`${name}: ${found}. If the change is meant, run this with --record.`];
}

/** Library versions inform; another version is no difference. */
function withoutLibraries({ libraries: _, ...rest }) {
  return rest;
}

/** Sentences about rasters that do not hold the recorded levels, given as NAME=FILE. */
function readBack(pairs) {
  const named = pairs.map((pair) => [pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1)]);
  const { files } = JSON.parse(
    python(
      'read_cog.py',
      named.map(([, file]) => file),
    ),
  );
  return named.flatMap(([name, file]) => {
    const { levelSha256, width, height } = recorded(name);
    const read = files[file];
    const found = firstDifference(
      { width, height, type: 'float32', sha256: levelSha256 },
      { width: read.width, height: read.height, type: read.type, sha256: read.sha256 },
    );
    console.log(`${name}: ${file} ${found === null ? 'read back with the recorded levels' : 'differs'}`);
    return found === null ? [] : [`${file} does not hold the levels of ${name}: ${found}.`];
  });
}
