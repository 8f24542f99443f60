import { mkdtempSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build } from 'vite';
import { afterAll } from 'vitest';

/** Path of the command line as one file beside the packages that it imports, removed in the end. */
export async function bundledBin(): Promise<string> {
  const folder = mkdtempSync(resolve('node_modules', '.overbrim-'));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  await build({
    configFile: false,
    logLevel: 'silent',
    build: {
      ssr: resolve('src/node/bin.ts'),
      outDir: folder,
      emptyOutDir: false,
      target: 'node20',
      rolldownOptions: { output: { entryFileNames: 'bin.mjs' } },
    },
  });
  return join(folder, 'bin.mjs');
}
