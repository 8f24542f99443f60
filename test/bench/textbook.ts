import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The textbook flood, compiled on the spot (see textbook-flood.cpp). */
export interface Textbook {
  /** Name and version of the compiler. */
  readonly compiler: string;
  /** Hands over the ground that the next floods run on. */
  give(elevationM: Float32Array, side: number): void;
  /** Seconds of one flood, without reading and writing. */
  flood(): number;
  /** Levels of the last flood. */
  levels(): Float32Array;
  remove(): void;
}

/** Compiles with the first compiler found; null where the machine has none. */
export function compiledTextbook(): Textbook | null {
  const compiler = ['g++', 'clang++', 'c++'].find((name) => spawnSync(name, ['--version']).status === 0);
  if (compiler === undefined) return null;
  const folder = mkdtempSync(join(tmpdir(), 'textbook-flood-'));
  const program = join(folder, 'textbook-flood');
  const elevation = join(folder, 'elevation.f32');
  const level = join(folder, 'level.f32');
  const source = fileURLToPath(new URL('./textbook-flood.cpp', import.meta.url));
  run(compiler, ['-O3', '-std=c++17', '-o', program, source]);
  let size = 0;
  return {
    compiler: `${run(compiler, ['--version']).split('\n')[0]}, -O3`,
    give(elevationM, side) {
      size = side;
      writeFileSync(elevation, elevationM);
    },
    flood() {
      const said: { seconds: number } = JSON.parse(run(program, [`${size}`, `${size}`, elevation, level]));
      return said.seconds;
    },
    levels() {
      return new Float32Array(new Uint8Array(readFileSync(level)).buffer);
    },
    remove() {
      rmSync(folder, { recursive: true });
    },
  };
}

function run(command: string, given: string[]): string {
  const { status, stdout, stderr } = spawnSync(command, given, { encoding: 'utf8' });
  if (status !== 0) throw new Error(`${command} ${given.join(' ')} failed: ${stderr}`);
  return stdout;
}
