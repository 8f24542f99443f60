import { exitCodes } from './exit-codes.ts';

/** The two streams of `process` that are written to. */
export interface Streams {
  readonly stdout: NodeJS.WritableStream;
  readonly stderr: NodeJS.WritableStream;
}

/** The reader has left, as `head` does when it has seen enough; that is no failure. */
const left = new Set(['EPIPE', 'ERR_STREAM_DESTROYED']);

/**
 * Keeps work from being broken off in the middle because nobody reads what is printed or the disk for it is full:
 * what counts are the files. A reader that has left is not told of; that standard output could not be written is told
 * on standard error, once.
 * @returns waits for what was printed and gives the exit code for it.
 */
export function sparedWrites({ stdout, stderr }: Streams, asJson: boolean): () => Promise<number> {
  let code: number = exitCodes.done;
  // What cannot be told on standard error cannot be told at all.
  stderr.on('error', () => {});
  stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (code !== exitCodes.done || left.has(error.code ?? '')) return;
    code = exitCodes.failed;
    const message = `Standard output could not be written (${error.message}); write it where there is space.`;
    stderr.write(asJson ? `${JSON.stringify({ code: 'failed', message })}\n` : `overbrim: ${message}\n`);
  });
  return () =>
    new Promise((resolve) => {
      // Errors are told after the call-backs of the writes.
      stdout.write('', () => setImmediate(() => resolve(code)));
    });
}
