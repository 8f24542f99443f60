import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/index.ts';
import { ResultFolder, resultFile } from '../../src/node/result-folder.ts';
import { WorkFolder } from './work-folder.ts';

const work = new WorkFolder();
const never = () => {};
const result = { json: { process: { id: 'sample' } } };

async function filled(name: string, file: string, content: string): Promise<ResultFolder> {
  const folder = new ResultFolder(work.at(name), 'sample', ['a.txt']);
  folder.begin();
  await folder.write(file, { text: [content] }, never);
  await folder.write(resultFile, result, never);
  return folder;
}

describe('ResultFolder', () => {
  it('appears whole', async () => {
    const folder = await filled('whole', 'a.txt', 'a');
    expect(existsSync(work.at('whole'))).toBe(false);
    folder.finish();
    expect(work.list()).toEqual(['whole', 'whole/a.txt', 'whole/result.json']);
  });

  it('hashes what it writes, whatever form it comes in', async () => {
    const folder = new ResultFolder(work.at('forms'), 'sample', ['a.txt']);
    folder.begin();
    // SHA-256 of "abc": FIPS 180-2, appendix B.1 (value from memory).
    const sha256 = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
    const expected = { bytes: 3, sha256 };
    expect(await folder.write('a', { text: ['a', '', 'bc'] }, never)).toEqual({ file: 'a', ...expected });
    expect(await folder.write('b', { bytes: new Uint8Array([97, 98, 99]) }, never)).toEqual({
      file: 'b',
      ...expected,
    });
    expect(await folder.write('c', { json: { a: 1 } }, never)).toMatchObject({ bytes: 13 });
    folder.discard();
  });

  it('replaces its own earlier files and leaves others alone', async () => {
    (await filled('again', 'a.txt', 'old')).finish();
    writeFileSync(work.at('again', 'mine.txt'), 'mine');
    (await filled('again', 'a.txt', 'new')).finish();
    expect(readFileSync(work.at('again', 'a.txt'), 'utf8')).toBe('new');
    expect(work.list().filter((path) => path.startsWith('again/'))).toEqual(
      ['a.txt', 'mine.txt', 'result.json'].map((file) => `again/${file}`),
    );
  });

  it('leaves nothing of what it discards, the folders above it neither', async () => {
    const before = work.list();
    (await filled('deep/down/below', 'a.txt', 'a')).discard();
    expect(work.list()).toEqual(before);
    (await filled('again', 'a.txt', 'newest')).discard();
    expect(work.list()).toEqual(before);
    expect(readFileSync(work.at('again', 'a.txt'), 'utf8')).toBe('new');
  });

  it('keeps a folder above it that others use by now', async () => {
    const folder = await filled('shared/mine', 'a.txt', 'a');
    work.put('shared/theirs.txt', 'theirs');
    folder.discard();
    expect(work.list().filter((path) => path.startsWith('shared'))).toEqual(['shared', 'shared/theirs.txt']);
  });

  it('stops between two pieces when told to', async () => {
    const folder = new ResultFolder(work.at('stopped'), 'sample', ['a.txt']);
    folder.begin();
    let pieces = 0;
    function* text(): Generator<string> {
      for (;;) {
        pieces++;
        yield 'x'.repeat(70_000);
      }
    }
    const stop = () => {
      if (pieces > 3) throw new OverbrimError('cancelled', 'Enough.');
    };
    await expect(folder.write('endless', { text: text() }, stop)).rejects.toThrow('Enough.');
    folder.discard();
    expect(existsSync(work.at('stopped'))).toBe(false);
  });

  it.each([
    ['{"process":{"id":"other"}}', 'holds results of other; choose another folder for sample with --out.'],
    ['{"a":1}', 'holds results of something else; choose another folder'],
    ['no JSON', 'holds results of something else; choose another folder'],
    ['null', 'holds results of something else; choose another folder'],
  ])('refuses a folder whose result.json is %s', (content, message) => {
    work.folder('taken');
    work.put('taken/result.json', content);
    expect(() => new ResultFolder(work.at('taken'), 'sample', ['a.txt'])).toThrow(message);
  });

  it('overwrote a file of the same name that is no result of ours: it refuses the folder', () => {
    work.folder('theirs');
    work.put('theirs/a.txt', 'by the analyst');
    expect(() => new ResultFolder(work.at('theirs'), 'sample', ['b.txt', 'a.txt'])).toThrow(
      new OverbrimError(
        'bad-input',
        `The folder ${work.at('theirs')} holds a file a.txt that is no result of sample, since there is no result.json beside it; move it away or choose another folder with --out.`,
      ),
    );
    expect(() => new ResultFolder(work.at('theirs'), 'sample', ['b.txt'])).not.toThrow();
  });

  it.each(['', ' '])('wrote into the current folder when the path was "%s": it refuses that', (path) => {
    expect(() => new ResultFolder(path, 'sample', [])).toThrow(
      new OverbrimError(
        'bad-input',
        `The folder for the results is "${path}"; give its path with --out, such as --out . for the current folder.`,
      ),
    );
  });

  it('says where it cannot write', () => {
    const file = work.put('file.txt', '');
    const folder = new ResultFolder(`${file}/out`, 'sample', ['a.txt']);
    expect(() => folder.begin()).toThrow(
      /file\.txt\/out could not be written \(.+\); check the folder, its permissions and the space on the disk\.$/,
    );
    folder.discard();
  });
});
