/**
 * Which room of src may import which. 'types' = only types cross; a list of files = only those may be reached.
 * Rooms that are not listed for a room are shut to it. Nothing imports upwards and nothing in a circle.
 * Processes take of the host what anyone's process gets, its index: the built-in ones have no private door.
 */
const table = {
  core: {},
  hydraulics: {},
  raster: { core: 'all' },
  host: { core: 'types' },
  processes: { core: 'all', hydraulics: 'all', raster: 'all', host: ['index'] },
  engine: { core: 'all', hydraulics: 'all', raster: 'all', host: 'all', processes: 'all' },
  publish: { core: 'types', raster: 'all', host: ['lineage'] },
  map: { core: 'types', raster: ['crs', 'transform', 'place', 'terrain'] },
  elements: { map: 'all', host: 'all', engine: ['client'], publish: 'all', core: 'types' },
  node: {
    core: 'all',
    hydraulics: 'all',
    raster: 'all',
    host: 'all',
    processes: 'all',
    engine: 'all',
    publish: 'all',
  },
};

/** The one class that every room may throw, and so the one value that crosses where only types may. */
const errors = '^src/core/error[.]ts$';

/** The package by its own name: what the demo and the checks of the built package import. */
const ownName = '^overbrim(/|$)';

/** Rooms without any package from outside, and those that may reach for what only Node has. */
const withoutPackages = ['core', 'hydraulics'];
const withNode = ['node'];

const rooms = Object.keys(table);
const oneOf = (names) => `(${names.join('|')})`;
const room = (name) => `^src/${name}/`;

const roomRules = rooms.flatMap((name) => {
  const open = Object.entries(table[name]);
  const rules = [
    {
      name: `${name}-reaches-only-its-rooms`,
      comment: `src/${name} may import ${open.map(([other]) => other).join(', ') || 'nothing'} of ours.`,
      severity: 'error',
      from: { path: room(name) },
      to: { path: '^(src|test|demo)/', pathNot: `^src/${oneOf([name, ...open.map(([other]) => other)])}/` },
    },
  ];
  for (const [other, what] of open) {
    if (what === 'types') {
      rules.push({
        name: `${name}-takes-only-types-of-${other}`,
        comment: `src/${name} may know the types of src/${other}, and run none of its code.`,
        severity: 'error',
        from: { path: room(name) },
        to: { path: room(other), pathNot: errors, dependencyTypesNot: ['type-only'] },
      });
    }
    if (Array.isArray(what)) {
      rules.push({
        name: `${name}-takes-only-${what.join('-')}-of-${other}`,
        comment: `src/${name} may import only ${what.join(', ')} of src/${other}.`,
        severity: 'error',
        from: { path: room(name) },
        to: { path: room(other), pathNot: `^src/${other}/${oneOf(what)}[.]ts$` },
      });
    }
  }
  return rules;
});

module.exports = {
  forbidden: [
    ...roomRules,
    {
      name: 'every-import-is-from-a-room',
      comment: 'A new folder of src needs its line in the table above.',
      severity: 'error',
      from: {},
      to: { path: '^src/', pathNot: [`^src/${oneOf(rooms)}/`, '^src/(index|script)[.]ts$'] },
    },
    {
      name: 'every-source-lives-in-a-room',
      comment: 'A new folder of src needs its line in the table above.',
      severity: 'error',
      from: { path: '^src/', pathNot: [`^src/${oneOf(rooms)}/`, '^src/(index|script)[.]ts$'] },
      to: {},
    },
    {
      name: 'no-circles',
      comment: 'Two files that need each other are one idea, or a third is missing.',
      severity: 'error',
      from: {},
      to: { circular: true },
    },
    {
      name: 'nothing-from-outside',
      comment: 'The analysis stands alone: no package, nothing of Node, no page.',
      severity: 'error',
      from: { path: `^src/${oneOf(withoutPackages)}/` },
      to: { pathNot: '^src/' },
    },
    {
      name: 'node-only-in-its-room',
      comment: 'Everything else also runs in a browser.',
      severity: 'error',
      from: { path: '^src/', pathNot: `^src/${oneOf(withNode)}/` },
      to: { dependencyTypes: ['core'] },
    },
    {
      name: 'map-library-only-on-maps',
      comment: 'The page hands its own OpenLayers in; the analysis does without.',
      severity: 'error',
      from: { path: '^src/', pathNot: '^src/(map|elements)/' },
      to: { path: '(^|node_modules/)ol(/|$)' },
    },
    {
      name: 'package-is-declared',
      comment:
        'What users run must be among dependencies or peerDependencies; types may come from elsewhere.',
      severity: 'error',
      from: { path: '^src/' },
      to: {
        dependencyTypes: ['npm-dev', 'npm-no-pkg', 'npm-unknown'],
        // A peer is also installed for our own tests.
        dependencyTypesNot: ['type-only', 'npm-peer'],
      },
    },
    {
      name: 'import-is-found',
      comment: 'The import leads nowhere.',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true, pathNot: ownName },
    },
    {
      name: 'sources-import-by-path',
      comment: 'By its own name the package is the built one, which may be older.',
      severity: 'error',
      from: { path: '^src/' },
      to: { path: [ownName, '^dist/'] },
    },
    {
      name: 'demo-uses-the-built-package',
      comment: 'The demo shows what a user of the package can do.',
      severity: 'error',
      from: { path: '^demo/' },
      to: { path: '^(src|test)/' },
    },
    {
      name: 'oracles-stand-apart',
      comment: 'A check against the outside must not lean on the code that it checks.',
      severity: 'error',
      from: { path: '^test/(outside|core)/oracles/' },
      to: { path: '^(src|dist)/', dependencyTypesNot: ['type-only'] },
    },
  ],
  options: {
    doNotFollow: { path: ['node_modules', '^dist/'] },
    tsPreCompilationDeps: 'specify',
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'types', 'node', 'default'],
      mainFields: ['module', 'main', 'types'],
    },
  },
};
