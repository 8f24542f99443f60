import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmdirSync,
  rmSync,
  statSync,
} from 'node:fs';
import { type FileHandle, open } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { OverbrimError } from '../core/index.ts';
import type { OutputBody } from '../host/index.ts';

/** The file that makes a folder a result; it is the last to arrive. */
export const resultFile = 'result.json';

/** One file as written. */
export interface WrittenFile {
  readonly file: string;
  readonly bytes: number;
  readonly sha256: string;
}

/**
 * A folder of results that appears whole or not at all: files are written into a hidden folder (beside it, or inside
 * where it exists and may be a disk of its own) and moved when all are there.
 */
export class ResultFolder {
  readonly path: string;
  readonly #partial: string;
  /** Folders above the results that were not there before, outermost first. */
  readonly #made: string[] = [];
  #begun = false;

  /**
   * `files` are the names of those that are going to be written.
   * @throws OverbrimError `bad-input` when the path is empty or a file, or a folder that holds the result of another
   * process or, without any result, a file of one of those names.
   */
  constructor(path: string, processId: string, files: readonly string[]) {
    if (path.trim() === '') {
      throw new OverbrimError(
        'bad-input',
        `The folder for the results is "${path}"; give its path with --out, such as --out . for the current folder.`,
      );
    }
    this.path = resolve(path);
    const exists = existsSync(this.path);
    const around = exists ? this.path : dirname(this.path);
    this.#partial = join(around, `.${process.pid}-${Date.now()}.partial`);
    if (!exists) return;
    if (!statSync(this.path).isDirectory()) {
      throw new OverbrimError('bad-input', `${path} is a file; give a folder for the results with --out.`);
    }
    const other = processOfResult(join(this.path, resultFile));
    if (other !== null && other !== processId) {
      throw new OverbrimError(
        'bad-input',
        `The folder ${path} holds results of ${other}; choose another folder for ${processId} with --out.`,
      );
    }
    const foreign = files.find((file) => existsSync(join(this.path, file)));
    if (other === null && foreign !== undefined) {
      throw new OverbrimError(
        'bad-input',
        `The folder ${path} holds a file ${foreign} that is no result of ${processId}, since there is no ${resultFile} beside it; move it away or choose another folder with --out.`,
      );
    }
  }

  /**
   * Makes the hidden folder, so that a place that cannot be written is told before the work and not after it.
   * @throws OverbrimError `failed` then.
   */
  begin(): void {
    try {
      // Folder by folder: in some places that take no folders Node's recursive way never comes back.
      this.#makeAbove(dirname(this.#partial));
      mkdirSync(this.#partial);
      this.#begun = true;
    } catch (error) {
      throw notWritten(this.path, error);
    }
  }

  #makeAbove(folder: string): void {
    if (existsSync(folder)) return;
    this.#makeAbove(dirname(folder));
    mkdirSync(folder);
    this.#made.push(folder);
  }

  /** Writes one file; `stop` is asked between pieces and throws to end the writing. */
  async write(file: string, body: OutputBody, stop: () => void): Promise<WrittenFile> {
    const hash = createHash('sha256');
    let bytes = 0;
    let handle: FileHandle | undefined;
    try {
      handle = await open(join(this.#partial, file), 'w');
      for (const piece of piecesOf(body)) {
        stop();
        const data = typeof piece === 'string' ? Buffer.from(piece) : piece;
        hash.update(data);
        bytes += data.length;
        await handle.writeFile(data);
      }
    } catch (error) {
      throw error instanceof OverbrimError ? error : notWritten(join(this.path, file), error);
    } finally {
      await handle?.close();
    }
    return { file, bytes, sha256: hash.digest('hex') };
  }

  /** Moves everything into place; files of an earlier run of the same process are replaced, others stay. */
  finish(): void {
    try {
      if (!existsSync(this.path)) {
        renameSync(this.#partial, this.path);
        return;
      }
      rmSync(join(this.path, resultFile), { force: true });
      const files = readdirSync(this.#partial).filter((file) => file !== resultFile);
      for (const file of [...files, resultFile]) renameSync(join(this.#partial, file), join(this.path, file));
      rmSync(this.#partial, { recursive: true });
    } catch (error) {
      throw notWritten(this.path, error);
    }
  }

  /** Removes what was written so far, and the folders made for it unless others use them by now. */
  discard(): void {
    if (this.#begun) rmSync(this.#partial, { recursive: true, force: true });
    for (const folder of this.#made.reverse()) {
      try {
        rmdirSync(folder);
      } catch {
        return;
      }
    }
  }
}

/** Pieces are gathered, so that a feature a line does not cost a write a feature. */
function* piecesOf(body: OutputBody): Generator<string | Uint8Array> {
  if ('bytes' in body) yield body.bytes;
  else if ('json' in body) yield `${JSON.stringify(body.json, null, 2)}\n`;
  else {
    let held = '';
    for (const piece of body.text) {
      held += piece;
      if (held.length > 65536) {
        yield held;
        held = '';
      }
    }
    yield held;
  }
}

function processOfResult(path: string): string | null {
  if (!existsSync(path)) return null;
  try {
    const id: unknown = JSON.parse(readFileSync(path, 'utf8'))?.process?.id;
    return typeof id === 'string' ? id : 'something else';
  } catch {
    return 'something else';
  }
}

function notWritten(path: string, cause: unknown): OverbrimError {
  const why = cause instanceof Error ? cause.message : String(cause);
  return new OverbrimError(
    'failed',
    `${path} could not be written (${why}); check the folder, its permissions and the space on the disk.`,
    { cause },
  );
}
