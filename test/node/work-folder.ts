import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';
import { type MadePlace, terrainFile } from '../processes/made-terrain.ts';

/** A folder of its own for a test file, removed in the end. */
export class WorkFolder {
  readonly path = mkdtempSync(join(tmpdir(), 'overbrim-'));

  constructor() {
    afterAll(() => rmSync(this.path, { recursive: true, force: true }));
  }

  at(...names: string[]): string {
    return join(this.path, ...names);
  }

  /** Writes a file and gives its path. */
  put(name: string, content: string | Uint8Array): string {
    writeFileSync(this.at(name), content);
    return this.at(name);
  }

  async terrain(name: string, rows: readonly (readonly number[])[], place: MadePlace = {}): Promise<string> {
    return this.put(name, await terrainFile(rows, place));
  }

  folder(name: string): string {
    mkdirSync(this.at(name), { recursive: true });
    return this.at(name);
  }

  json(...names: string[]): Record<string, unknown> {
    return JSON.parse(readFileSync(this.at(...names), 'utf8'));
  }

  /** Everything in it, hidden or not, by relative path. */
  list(): string[] {
    return (readdirSync(this.path, { recursive: true }) as string[]).sort();
  }
}
