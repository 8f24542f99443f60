import { PassThrough } from 'node:stream';
import { main, type Terminal } from '../../src/node/index.ts';

/** A terminal that keeps what is written and can be interrupted. */
export class FakeTerminal implements Terminal {
  out = '';
  err = '';
  readonly stdout = {
    write: (text: string): void => {
      this.out += text;
    },
  };
  readonly stderr: Terminal['stderr'];
  readonly #listeners = new Map<string, Set<() => void>>();

  constructor(isTTY = false, onError: (text: string) => void = () => {}) {
    const stream = new PassThrough();
    stream.on('data', (chunk: Buffer) => {
      this.err += chunk.toString();
      onError(chunk.toString());
    });
    this.stderr = Object.assign(stream, { isTTY });
  }

  on(event: string, listener: () => void): void {
    this.#listeners.set(event, (this.#listeners.get(event) ?? new Set()).add(listener));
  }

  off(event: string, listener: () => void): void {
    this.#listeners.get(event)?.delete(listener);
  }

  /** As Ctrl-C does. */
  interrupt(event: 'SIGINT' | 'SIGTERM' = 'SIGINT'): void {
    for (const listener of this.#listeners.get(event) ?? []) listener();
  }

  get listening(): number {
    return [...this.#listeners.values()].reduce((sum, listeners) => sum + listeners.size, 0);
  }
}

export interface Ran {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

/** Runs the command line in this process. */
export async function overbrim(...args: string[]): Promise<Ran> {
  const terminal = new FakeTerminal();
  const code = await main(args, terminal);
  // What was written last arrives with the next turn.
  await new Promise((resolve) => setImmediate(resolve));
  return { code, out: terminal.out, err: terminal.err };
}
