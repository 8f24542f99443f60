import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** Lists the hash of each script and of what lies beside it, in the form of W3C Subresource Integrity. */
export const hashes = {
  name: 'hashes',
  writeBundle({ file }) {
    const folder = dirname(file);
    const names = readdirSync(folder).filter((name) => /^overbrim.*\.(js|json)$/.test(name));
    const listed = names.sort().map((name) => {
      const digest = createHash('sha384')
        .update(readFileSync(join(folder, name)))
        .digest('base64');
      return [name, `sha384-${digest}`];
    });
    writeFileSync(join(folder, 'hashes.json'), `${JSON.stringify(Object.fromEntries(listed), null, 2)}\n`);
  },
};
