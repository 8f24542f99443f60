import { execFileSync, spawnSync } from 'node:child_process';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');

interface Manifest {
  readonly version: string;
  readonly exports: Readonly<Record<string, string | { readonly types: string; readonly default: string }>>;
  readonly bin: Readonly<Record<string, string>>;
  readonly sideEffects: readonly string[];
  readonly dependencies: Readonly<Record<string, string>>;
}

/** An empty project with the packed package in it, as a user has it after installing. */
export interface Installed {
  readonly folder: string;
  readonly packageFolder: string;
  readonly manifest: Manifest;
  /** Files of the package, with forward slashes. */
  readonly files: readonly string[];
  /** Writes a file of the user's. */
  write(name: string, text: string): string;
  /** Runs Node in the project. */
  node(...args: string[]): {
    readonly status: number | null;
    readonly stdout: string;
    readonly stderr: string;
  };
  remove(): void;
}

/**
 * Packs the built package and installs it, with the given packages beside it and no others.
 * @throws Error when there is no build.
 */
export function installed(beside: (manifest: Manifest) => readonly string[]): Installed {
  if (!existsSync(join(root, 'dist/index.js'))) {
    throw new Error('There is no dist/index.js to pack; run npm run build first.');
  }
  // Not below the repository, or its node_modules would be found from there.
  const folder = mkdtempSync(join(tmpdir(), 'overbrim-packaging-'));
  const args = ['pack', '--json', '--ignore-scripts', '--pack-destination', folder];
  const [packed] = JSON.parse(execFileSync('npm', args, { cwd: root, encoding: 'utf8' }));
  const packageFolder = join(folder, 'node_modules/overbrim');
  mkdirSync(packageFolder, { recursive: true });
  execFileSync('tar', ['-xzf', join(folder, packed.filename), '-C', packageFolder, '--strip-components=1']);
  const manifest: Manifest = JSON.parse(readFileSync(join(packageFolder, 'package.json'), 'utf8'));
  for (const name of beside(manifest)) {
    const link = join(folder, 'node_modules', name);
    mkdirSync(dirname(link), { recursive: true });
    symlinkSync(join(root, 'node_modules', name), link, 'dir');
  }
  const write = (name: string, text: string): string => {
    writeFileSync(join(folder, name), text);
    return join(folder, name);
  };
  write('package.json', '{ "name": "user", "type": "module", "private": true }\n');
  return {
    folder,
    packageFolder,
    manifest,
    files: packed.files.map((file: { path: string }) => file.path),
    write,
    node: (...given) => spawnSync(process.execPath, given, { cwd: folder, encoding: 'utf8' }),
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}
