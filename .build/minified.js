import { minifySync } from 'vite';

/** Shortens a script, keeping the names that it gives to the page. */
export const minified = {
  name: 'minified',
  renderChunk(code, { fileName }) {
    const {
      code: short,
      map,
      errors,
    } = minifySync(fileName, code, { sourceType: 'script', sourcemap: true });
    if (errors.length > 0) throw new Error(`${fileName} cannot be shortened: ${errors[0].message}`);
    return { code: plainAscii(short), map };
  },
};

/** Letters beyond ASCII as escapes, so that a page without a declared encoding shows them as they are. */
function plainAscii(code) {
  return code.replace(
    /[\u0080-\uffff]/g,
    (letter) => `\\u${letter.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}
