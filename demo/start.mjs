// Builds the demo site, serves it and opens it in the browser: `npm start`, or `node demo/start.mjs [FOLDER]` with
// another folder for the site. OVERBRIM_PORT names a port; Ctrl-C ends it.

import { spawn } from 'node:child_process';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { preview } from 'vite';
import { buildSite } from './site.mjs';

const folder = resolve(process.argv[2] ?? fileURLToPath(new URL('../out/site', import.meta.url)));
const named = process.env.OVERBRIM_PORT;
const port = named === undefined || named === '' ? 8080 : Number(named);
if (!Number.isInteger(port) || port < 1 || port > 65535) {
  console.error(`OVERBRIM_PORT is ${named}, which is no port; name one from 1 to 65535 or leave it out.`);
  process.exit(2);
}

await buildSite(folder);
const server = await preview({
  configFile: false,
  logLevel: 'error',
  build: { outDir: folder },
  // The next free port is taken where this one is not.
  preview: { port, host: '127.0.0.1' },
});
const address = server.resolvedUrls?.local[0] ?? `http://127.0.0.1:${port}/`;
console.log(`
Brimsallow, an invented town:           ${address}
The same town's page, by one script tag: ${address}plain/
Ctrl-C ends the server.`);
openInBrowser(address);

for (const signal of ['SIGINT', 'SIGTERM']) {
  process.once(signal, async () => {
    await server.close();
    process.exit(0);
  });
}

/** Where there is no browser, the address above is enough. */
function openInBrowser(url) {
  if (process.env.CI) return;
  const [command, ...args] = { darwin: ['open', url], win32: ['cmd', '/c', 'start', '', url] }[
    process.platform
  ] ?? ['xdg-open', url];
  spawn(command, args, { stdio: 'ignore', detached: true })
    .on('error', () => {})
    .unref();
}
