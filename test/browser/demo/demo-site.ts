import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const pathOf = (file: string): string => fileURLToPath(new URL(`../../../${file}`, import.meta.url));

/** How long building and starting may take, milliseconds. */
const patienceMs = 55_000;

export interface DemoSite {
  readonly url: string;
  /** Ends the server as Ctrl-C does; gives its exit code. */
  stop(): Promise<number | null>;
}

/** Starts what `npm start` starts after the build, with a folder of its own for the site. */
export function startDemo(name: string, port = ''): Promise<DemoSite> {
  // A package built under the test runner's environment would be one for development.
  const { NODE_ENV: _, ...env } = process.env;
  const child = spawn(process.execPath, [pathOf('demo/start.mjs'), pathOf(`out/test-site/${name}`)], {
    // No browser may open by itself.
    env: { ...env, CI: 'true', OVERBRIM_PORT: port },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const ended = new Promise<number | null>((resolve) => child.once('exit', resolve));
  const stop = (): Promise<number | null> => {
    child.kill('SIGINT');
    return ended;
  };
  let told = '';
  return new Promise((resolve, reject) => {
    const timeout = setTimeout(() => reject(new Error(`The demo did not start: ${told}`)), patienceMs);
    const hear = (text: Buffer): void => {
      told += text;
      const url = /^Brimsallow.*?(http\S+)/m.exec(told)?.[1];
      if (url === undefined || !told.includes('Ctrl-C')) return;
      clearTimeout(timeout);
      resolve({ url, stop });
    };
    child.stdout.on('data', hear);
    child.stderr.on('data', hear);
    void ended.then((code) => reject(new Error(`The demo ended with ${code}: ${told}`)));
  });
}
