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
    return { code: short, map };
  },
};
