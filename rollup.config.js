import { rmSync } from 'node:fs';
import typescript from '@rollup/plugin-typescript';

/** What package.json hands on: module in dist → its source. */
const entries = {
  index: 'src/index.ts',
  'core/index': 'src/core/index.ts',
  'raster/index': 'src/raster/index.ts',
  'host/index': 'src/host/index.ts',
  'processes/index': 'src/processes/index.ts',
  'node/index': 'src/node/index.ts',
  'node/bin': 'src/node/bin.ts',
};

/** A module that disappears from src must not live on in dist. */
const emptyFirst = {
  name: 'empty-first',
  buildStart() {
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

export default {
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
  ],
  onwarn(warning) {
    throw new Error(`The build must be free of warnings, and says: ${warning.message}`);
  },
};
