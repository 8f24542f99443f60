import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

const folderOfPackage = /^.*\/node_modules\/(?:@[^/]+\/)?[^/]+(?=\/)/;

/** The licences of the packages inside the scripts, gathered over all builds and written with the last. */
export function licences() {
  const folders = new Set();
  return {
    gather: {
      name: 'licences-gathered',
      moduleParsed({ id }) {
        const folder = folderOfPackage.exec(id.replace(/^\0/, ''))?.[0];
        if (folder !== undefined) folders.add(folder);
      },
    },
    write: {
      name: 'licences-written',
      generateBundle() {
        const texts = [...folders].map(licenceText).sort();
        this.emitFile({ type: 'asset', fileName: 'licences.txt', source: texts.join('\n\n') });
      },
    },
  };
}

function licenceText(folder) {
  const { name, version, license } = JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));
  const file = readdirSync(folder).find((entry) => /^licen[cs]e/i.test(entry));
  const text = file === undefined ? '' : readFileSync(join(folder, file), 'utf8').trim();
  return `${name} ${version} (${license})\n\n${text}\n`;
}
