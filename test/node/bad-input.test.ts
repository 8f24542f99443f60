import { readFileSync } from 'node:fs';
import { afterEach, describe, expect, it } from 'vitest';
import { floorWithVoid, twoPonds } from '../processes/small-terrains.ts';
import { overbrim } from './fake-terminal.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const two = await work.terrain('two.tif', twoPonds);
const silent = await work.terrain('silent.tif', twoPonds, { verticalUnit: null });
const holed = await work.terrain('holed.tif', floorWithVoid);
const empty = await work.terrain('empty.tif', [[Number.NaN, Number.NaN]]);
const endless = await work.terrain('endless.tif', [[1, 2, Number.POSITIVE_INFINITY]]);
const other = await work.terrain('other.tif', twoPonds, { epsg: 32632 });
const noTiff = work.put('letter.tif', 'Dear town council, here is our elevation model.');
const truncated = work.put('truncated.tif', readFileSync(two).subarray(0, 300));
const notJson = work.put('broken.geojson', '{"type": "Feature",');
const far = work.put('far.geojson', '{"type":"Point","coordinates":[10,10]}');
await overbrim('run', 'depressions', '--terrain', two, '--out', work.at('held'));
work.folder('theirs');
work.put('theirs/ponds.geojson', '{}');
const before = work.list();

/** A failure leaves nothing: no folder of results, no hidden one, and what stood there stays. */
afterEach(() => expect(work.list()).toEqual(before));

const out = ['--out', work.at('out')];
const ponds = ['run', 'depressions', '--terrain', two, ...out];
const path = ['run', 'spill-path', '--terrain', two, ...out];
const help = 'see overbrim --help or overbrim run <process> --help.';

describe('wrong use exits with 2 and says', () => {
  it.each<[string, string[], string | RegExp]>([
    ['no process', ['run'], 'No process was named; expected run depressions or spill-path.'],
    [
      'an unknown process',
      ['run', 'puddles'],
      'There is no process "puddles"; expected one of depressions, spill-path.',
    ],
    [
      'an unknown process to describe',
      ['describe', 'puddles'],
      'There is no process "puddles"; expected one of depressions, spill-path.',
    ],
    ['an unknown command', ['puddles'], `unknown command 'puddles'; ${help}`],
    [
      'an unknown option',
      [...ponds, '--deep', '1'],
      `unknown option '--deep' (did you mean --help?); ${help}`,
    ],
    [
      'an option without its value',
      [...ponds, '--min-depth'],
      `option '--min-depth <value>' argument missing; ${help}`,
    ],
    [
      'something more',
      [...ponds, '--nested', 'yes'],
      `too many arguments for 'depressions'; expected 0 arguments but got 1; ${help}`,
    ],
    [
      'no terrain',
      ['run', 'depressions', ...out],
      'The input "terrain" (elevation file, or several as one mosaic) is missing; the process depressions cannot run without it, so give it.',
    ],
    [
      'no folder',
      ['run', 'depressions', '--terrain', two],
      `required option '--out <folder>' not specified; ${help}`,
    ],
    [
      'no start',
      path,
      'The input "from" (start of the path, as x,y) is missing; the process spill-path cannot run without it, so give it.',
    ],
    [
      'no number',
      [...ponds, '--min-depth', 'deep'],
      '--min-depth is "deep"; expected a number: least depth at brim of ponds to write, metres.',
    ],
    [
      'an empty number',
      [...ponds, '--min-area', ''],
      '--min-area is ""; expected a number: least area at brim of ponds to write, square metres.',
    ],
    [
      'a number out of range',
      [...ponds, '--min-capacity', '-1'],
      'The input "minCapacity" is -1; expected a number of at least 0: least capacity of ponds to write, cubic metres.',
    ],
    [
      'a wrong choice',
      [...ponds, '--edges', 'ajar'],
      'The input "edges" is "ajar"; expected one of open, closed.',
    ],
    [
      'a wrong number of neighbours',
      [...ponds, '--neighbours', '6'],
      'The input "neighbours" is 6; expected one of 8, 4.',
    ],
    [
      'a wrong unit',
      [...ponds, '--vertical-unit', 'yard'],
      'The input "verticalUnit" is "yard"; expected one of m, ft, us-ft.',
    ],
    [
      'an input without value',
      [...ponds, '--input', 'minDepth'],
      /^--input was given "minDepth"; expected name=value with one of the names terrain, verticalUnit/,
    ],
    ['an unknown input', [...ponds, '--input', 'deep=1'], /^--input was given "deep=1"; expected name=value/],
    [
      'an input that every object has',
      [...ponds, '--input', 'constructor=1'],
      /^--input was given "constructor=1"/,
    ],
    [
      'neither yes nor no',
      [...ponds, '--input', 'nested=maybe'],
      '--input nested is "maybe"; expected true or false: whether to write ponds inside ponds too.',
    ],
    [
      'a CRS without register',
      [...path, '--from', '3,0', '--crs', '4326'],
      'The input "crs" is "4326"; expected CRS of typed coordinates, as EPSG:code.',
    ],
    ...[[...path, '--from', '3,0'], ponds].map((args): [string, string[], string] => [
      'a CRS that is not known, whether a place uses it or not',
      [...args, '--crs', 'EPSG:99999'],
      'The input "crs" is "EPSG:99999", which is no projected or geographic CRS of the EPSG register that can be used; give another code with --crs, or none for coordinates in the CRS of the terrain.',
    ]),
    [
      'an empty path of a terrain',
      ['run', 'depressions', '--terrain', '', ...out],
      'The input "terrain" is ""; expected elevation file, or several as one mosaic.',
    ],
    [
      'an empty path of outlets',
      [...ponds, '--outlets', ''],
      'The input "outlets" is ""; expected further outlets: GeoJSON file, x,y, voids or deepest.',
    ],
    [
      'a level that float32 cannot hold',
      [...ponds, '--edge-level', '1e39'],
      'The input "edgeLevel" is 1e+39; expected a number of at least -3.4e+38 and at most 3.4e+38: level of the water beyond the edge, metres.',
    ],
    [
      'an empty folder, which was the current one',
      ['run', 'depressions', '--terrain', two, '--out', ''],
      'The folder for the results is ""; give its path with --out, such as --out . for the current folder.',
    ],
    [
      "a folder with the caller's own ponds.geojson",
      [...ponds.slice(0, -1), work.at('theirs')],
      /theirs holds a file ponds\.geojson that is no result of depressions, .*; move it away or choose another folder with --out\.$/,
    ],
    [
      'a unit that the file contradicts',
      [...ponds, '--vertical-unit', 'ft'],
      'two.tif says that its elevations are in metres, but --vertical-unit ft was given; leave the option out or mend the file.',
    ],
    [
      'an extent outside',
      [...ponds, '--extent', '0,0,1,1'],
      /^The extent \(--extent\) lies outside the terrain; expected /,
    ],
    [
      'a budget that no overview meets',
      [...ponds, '--cell-budget', '1'],
      /the budget is 1, so raise it \(--cell-budget\), give a smaller extent/,
    ],
    [
      'no unit',
      ['run', 'depressions', '--terrain', silent, ...out],
      'silent.tif does not say in which unit its elevations are; give --vertical-unit m|ft|us-ft.',
    ],
    [
      'no outlet',
      [...ponds, '--edges', 'closed'],
      'The terrain has no outlet: edges are closed, voids are "rim" and no outlet was named; open the edges or name an outlet, such as --outlets deepest.',
    ],
    [
      'a start that is none',
      [...path, '--from', 'here'],
      'The input "from" is "here"; expected a coordinate as x,y with a point as decimal sign, such as 1234.5,678.9.',
    ],
    [
      'a start outside',
      [...path, '--from', '985,500015'],
      /^The place 985,500015 \(WGS 84 \/ UTM zone 31N\) lies outside the terrain, which reaches from 500000,970 to 500100,1000 .*; check the coordinate, the order x,y and the input "crs"\.$/,
    ],
    [
      'a start on a void',
      ['run', 'spill-path', '--terrain', holed, ...out, '--from', '500025,975'],
      'The place 500025,975 lies on a cell without elevation (column 2, row 2); choose a place on known ground.',
    ],
    ['an outlet outside', [...ponds, '--outlets', '0,0'], /^The place 0,0 .* lies outside the terrain/],
    [
      'an outlet on a void',
      ['run', 'depressions', '--terrain', holed, ...out, '--outlets', '500025,975'],
      /^The place 500025,975 lies on a cell without elevation/,
    ],
    [
      'an outlet that is no word, place or file',
      [...ponds, '--outlets', 'deepst'],
      /^The outlet "deepst" is neither x,y nor voids nor deepest nor a GeoJSON file that can be read \(deepst does not exist; check the path\)\.$/,
    ],
    [
      'outlets that are not JSON',
      [...ponds, '--outlets', notJson],
      /broken\.geojson is not JSON \(.*\); expected a GeoJSON file\.$/,
    ],
    [
      'outlets outside',
      [...ponds, '--outlets', far],
      /^Feature 1 of .*far\.geojson lies outside the terrain; give outlets inside it/,
    ],
    [
      'a folder that is a file',
      [...ponds.slice(0, -1), two],
      /two\.tif is a file; give a folder for the results with --out\.$/,
    ],
    [
      'a folder of other results',
      [...path.slice(0, -1), work.at('held'), '--from', '500015,995'],
      /held holds results of depressions; choose another folder for spill-path with --out\.$/,
    ],
  ])('%s', async (_, args, message) => {
    const { code, out: printed, err } = await overbrim(...args);
    expect(sentenceOf(err)).toMatch(message);
    expect({ code, printed }).toEqual({ code: 2, printed: '' });
  });
});

describe('failure exits with 1 and says', () => {
  const terrain = (...files: string[]) => ['run', 'depressions', '--terrain', ...files, ...out];
  it.each<[string, string[], string | RegExp]>([
    ['that there is no file', terrain(work.at('none.tif')), /none\.tif does not exist; check the path\.$/],
    ['that it is a folder', terrain(work.path), /is not a file; give the path of an elevation file\.$/],
    ['that it is no TIFF', terrain(noTiff), /^letter\.tif .*TIFF/],
    ['that it is truncated', terrain(truncated), /^truncated\.tif /],
    [
      'that all is void',
      terrain(empty),
      'All 2 cells are void; expected at least one elevation, so check the extent and the no-data value.',
    ],
    [
      'that an elevation is infinite',
      terrain(endless),
      /^The elevation at column 2, row 0 is Infinity; expected a finite number of metres or a void, so declare the value as no-data or mend the file\.$/,
    ],
    [
      'that two files do not fit',
      terrain(two, other),
      'other.tif is in WGS 84 / UTM zone 32N; expected WGS 84 / UTM zone 31N as in two.tif, so warp it to the same grid first.',
    ],
    [
      'that the folder lies in a file',
      [...ponds.slice(0, -1), `${two}/out`],
      /two\.tif\/out could not be written \(.+\); check the folder, its permissions and the space on the disk\.$/,
    ],
  ])('%s', async (_, args, message) => {
    const { code, out: printed, err } = await overbrim(...args);
    expect(sentenceOf(err)).toMatch(message);
    expect({ code, printed }).toEqual({ code: 1, printed: '' });
  });

  it('the same as JSON', async () => {
    const { code, out: printed, err } = await overbrim(...terrain(silent), '--json');
    expect({ code, printed }).toEqual({ code: 2, printed: '' });
    expect(JSON.parse(err)).toEqual({
      code: 'unit-missing',
      message: 'silent.tif does not say in which unit its elevations are; give --vertical-unit m|ft|us-ft.',
    });
  });
});

/** The sentence after the lines of progress. */
function sentenceOf(err: string): string {
  return /^overbrim: (.*)\n$/m.exec(err)?.[1] ?? `no sentence in ${err}`;
}
