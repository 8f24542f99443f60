import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const folder = fileURLToPath(new URL('../../src/elements/', import.meta.url));
const modules = readdirSync(folder).filter((file) => /^(brim-.*|index)\.ts$/.test(file));

describe('on a server without a DOM', () => {
  it.each(modules)('imports %s', async (file) => {
    expect(typeof document).toBe('undefined');
    const names = Object.keys(await import(`${folder}${file}`));
    expect(names.some((name) => name.startsWith('Brim'))).toBe(true);
  });

  it('has a class module beside each defining one', () => {
    const defining = modules.filter((file) => /^brim-[a-z-]+\.ts$/.test(file));
    expect(defining).toHaveLength(5);
    for (const file of defining) expect(modules).toContain(file.replace('.ts', '.component.ts'));
  });
});
