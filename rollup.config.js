import { readdirSync, rmSync } from 'node:fs';
import commonjs from '@rollup/plugin-commonjs';
import nodeResolve from '@rollup/plugin-node-resolve';
import typescript from '@rollup/plugin-typescript';
import { elementsManifest } from './.build/elements-manifest.js';
import { epsgRegister } from './.build/epsg-register.js';
import { hashes } from './.build/hashes.js';
import { licences } from './.build/licences.js';
import { minified } from './.build/minified.js';
import { partEntry, partFiles, scriptIntro, scriptParts } from './.build/script-parts.js';
import { validatorInBlob } from './.build/validator-in-blob.js';

const inScripts = licences();

/** What package.json hands on: module in dist → its source. */
const entries = {
  index: 'src/index.ts',
  'core/index': 'src/core/index.ts',
  'raster/index': 'src/raster/index.ts',
  'host/index': 'src/host/index.ts',
  'processes/index': 'src/processes/index.ts',
  'engine/client': 'src/engine/client.ts',
  'engine/worker': 'src/engine/worker.ts',
  'map/index': 'src/map/index.ts',
  'node/index': 'src/node/index.ts',
  'node/bin': 'src/node/bin.ts',
  script: 'src/script.ts',
  ...everyElement(),
};

/** Each element is an entry of its own, by class and by definition. */
function everyElement() {
  const names = readdirSync('src/elements').filter((file) => /^(brim-.+|index)\.ts$/.test(file));
  return Object.fromEntries(
    names.map((file) => [`elements/${file.slice(0, -'.ts'.length)}`, `src/elements/${file}`]),
  );
}

/** A module that disappears from src must not live on in dist; what fails to compile leaves the last build. */
const emptyFirst = {
  name: 'empty-first',
  generateBundle() {
    rmSync('dist', { recursive: true, force: true });
  },
};

/** Sources import `./x.ts`; the compiler leaves that in declarations, where readers expect `./x.js`. */
const declarationImports = {
  name: 'declaration-imports',
  generateBundle(_options, bundle) {
    for (const file of Object.values(bundle)) {
      if (file.type !== 'asset' || !file.fileName.endsWith('.d.ts')) continue;
      file.source = String(file.source).replace(/((?:from|import) ?\(?['"]\.[^'"]*)\.ts(['"])/g, '$1.js$2');
    }
  },
};

/** The compiler wraps computed imports in a helper of its own; ours name packages and need none. */
const computedImports = {
  name: 'computed-imports',
  // The line keeps its place, so the source map stays as it is.
  renderChunk: (code) => ({
    code: code.replace(/__rewriteRelativeImportExtension\(([^()]*)\)/g, '$1'),
    map: null,
  }),
};

function onwarn(warning) {
  throw new Error(`The build must be free of warnings, and says: ${warning.message}`);
}

/** ES modules, unbundled, for bundlers and Node. */
const modules = {
  input: entries,
  // Everything that is not ours stays an import: the page or the package manager provides it once.
  external: (id) => !/^(\.|\/|src\/)/.test(id),
  output: {
    dir: 'dist',
    format: 'es',
    preserveModules: true,
    preserveModulesRoot: 'src',
    sourcemap: true,
    importAttributesKey: 'with',
  },
  plugins: [
    emptyFirst,
    typescript({
      tsconfig: 'tsconfig.json',
      include: ['src/**'],
      filterRoot: import.meta.dirname,
      noEmitOnError: true,
      compilerOptions: {
        noEmit: false,
        allowImportingTsExtensions: false,
        rewriteRelativeImportExtensions: true,
        declaration: true,
        outDir: 'dist',
        rootDir: 'src',
        stripInternal: true,
      },
    }),
    declarationImports,
    computedImports,
    epsgRegister,
    elementsManifest,
  ],
  onwarn,
};

/** OpenLayers is the page's own: `ol/layer/Layer.js` is its `ol.layer.Layer`. */
const isOpenLayers = (id) => /^ol(\/|$)/.test(id);
const pageGlobal = (id) => id.replace(/\.js$/, '').replace(/\//g, '.');

/** Without this the page would only say that `ol` is not defined. */
const openLayersFirst = `if (typeof ol === 'undefined' || !ol.layer || !ol.util) throw new Error('overbrim.js finds no OpenLayers on this page; load its full build (ol.js, version 7.5 to 10) by a script tag before overbrim.js.');`;

/** One plain file, from the modules built above. */
function script(file, input, output, plugins) {
  return {
    input,
    external: isOpenLayers,
    output: {
      file: `dist/${file}`,
      format: 'iife',
      globals: pageGlobal,
      externalImportAttributes: false,
      ...output,
    },
    plugins: [...plugins, nodeResolve({ browser: true }), commonjs(), inScripts.gather],
    onwarn,
  };
}

/** A script of our own, small. */
function ownScript(file, input, output = {}) {
  return script(file, input, { intro: scriptIntro, sourcemap: true, ...output }, [
    scriptParts(),
    validatorInBlob,
    minified,
  ]);
}

/** A rarely used package beside the scripts, small already. */
function part([name, file]) {
  return script(file, `part:${name}`, {}, [partEntry(name)]);
}

const builds = [
  modules,
  ownScript('overbrim-worker.js', 'dist/engine/worker.js'),
  ownScript('overbrim.js', 'dist/script.js', { name: 'overbrim', banner: openLayersFirst }),
  ...Object.entries(partFiles).map(part),
];
builds.at(-1).plugins.push(inScripts.write, hashes);

export default builds;
