import type { AddressInfo } from 'node:net';
import { createServer } from 'node:net';
import { expect, it } from 'vitest';
import { startDemo } from './demo-site.ts';

it('takes the next free port where the named one is taken, and ends well on Ctrl-C', async () => {
  const taken = createServer();
  await new Promise<void>((done) => taken.listen(0, '127.0.0.1', done));
  const { port } = taken.address() as AddressInfo;
  const site = await startDemo('start', String(port));
  try {
    expect(Number(new URL(site.url).port)).toBeGreaterThan(port);
    const pages = ['', 'plain/'].map(async (page) => (await fetch(site.url + page)).text());
    expect((await Promise.all(pages)).map((text) => /<h1>/.test(text))).toEqual([true, true]);
  } finally {
    expect(await site.stop()).toBe(0);
    taken.close();
  }
});

it.each(['eighty', '0', '70000'])('refuses the port %s in a sentence', async (port) => {
  await expect(startDemo('start', port)).rejects.toThrow(
    `ended with 2: OVERBRIM_PORT is ${port}, which is no port; name one from 1 to 65535 or leave it out.`,
  );
});
