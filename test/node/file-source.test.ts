import { describe, expect, it } from 'vitest';
import { fileSource } from '../../src/node/index.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const path = work.put(
  'ten.bin',
  Uint8Array.from({ length: 10 }, (_, i) => i),
);

describe('fileSource', () => {
  it('reads ranges, and fewer bytes only where the file ends', async () => {
    const source = await fileSource(path);
    expect([source.name, source.size]).toEqual(['ten.bin', 10]);
    expect([...(await source.read(3, 4))]).toEqual([3, 4, 5, 6]);
    expect([...(await source.read(8, 100))]).toEqual([8, 9]);
    expect(await source.read(10, 1)).toHaveLength(0);
    expect(await source.read(99, 5)).toHaveLength(0);
    await source.close?.();
  });

  it('says what is wrong with a path', async () => {
    const none = work.at('none.tif');
    await expect(fileSource(none)).rejects.toThrow(`${none} does not exist; check the path.`);
    await expect(fileSource(work.path)).rejects.toThrow(
      `${work.path} is not a file; give the path of an elevation file.`,
    );
    await expect(fileSource(`${path}/below`)).rejects.toThrow(
      `${path}/below could not be opened (ENOTDIR); check the path.`,
    );
  });
});
