// A script loaded by a tag, or a classic worker, is one file. What is large and rarely used stays a file beside it, in
// the same plain form: unlike modules such files need no leave from a server of another origin, and start in any
// worker.

/** Package → the file that holds it beside the scripts. */
export const partFiles = {
  zstddec: 'overbrim-zstd.js',
  'geotiff-geokeys-to-proj4': 'overbrim-user-defined-crs.js',
};

/* global overbrimAddress: these two are copied into each script, which knows its address. */

/** Loads a part once: as a script of the page, or into the worker. */
function overbrimPart(name, file) {
  globalThis.overbrimParts ??= {};
  const parts = globalThis.overbrimParts;
  if (parts[name] !== undefined) return Promise.resolve(parts[name]);
  // Whoever started the worker may know better: a bundler renames files, and inside a blob there is no address.
  const url = globalThis.overbrimPartAddresses?.[file] ?? new URL(file, overbrimAddress).href;
  const loaded = new Promise((resolve, reject) => {
    if (typeof document === 'undefined') {
      importScripts(url);
      resolve();
      return;
    }
    const script = document.createElement('script');
    script.src = url;
    script.onload = resolve;
    script.onerror = () => reject(new Error(`${url} could not be loaded`));
    document.head.append(script);
  });
  return loaded.then(() => parts[name]);
}

/** The address of the running script. */
function addressOfScript() {
  if (typeof document === 'undefined') return location.href;
  return document.currentScript?.src || document.baseURI;
}

/** What each script begins with. */
export const scriptIntro = `const overbrimAddress = (${addressOfScript})();\n${overbrimPart}\n`;

/** Makes large packages parts, and addresses beside a module addresses beside the script. */
export function scriptParts() {
  return {
    name: 'script-parts',
    resolveDynamicImport: (specifier) =>
      specifier in partFiles ? { id: specifier, external: true } : undefined,
    renderDynamicImport({ moduleId, targetModuleId }) {
      const file = partFiles[targetModuleId];
      if (file !== undefined) {
        return { left: 'overbrimPart(', right: `, ${JSON.stringify(file)})` };
      }
      // A register with one file a code exists only where packages are found by name; scripts hand in another.
      if (targetModuleId === null && moduleId.endsWith('/raster/epsg.js')) {
        return { left: 'Promise.reject(', right: ')' };
      }
      throw new Error(`${moduleId} imports ${targetModuleId} on demand; give it a line among the parts.`);
    },
    resolveImportMeta(property, { moduleId }) {
      if (property !== 'url') return undefined;
      const path = moduleId.slice(moduleId.lastIndexOf('/dist/') + '/dist/'.length);
      return `new URL(${JSON.stringify(path)}, overbrimAddress).href`;
    },
  };
}

/** A script that hands over a whole package as a part. */
export function partEntry(name) {
  const entry = `part:${name}`;
  return {
    name: 'part-entry',
    resolveId: (id) => (id === entry ? `\0${entry}` : undefined),
    load: (id) =>
      id === `\0${entry}`
        ? `import * as part from '${name}';\n(globalThis.overbrimParts ??= {})['${name}'] = part;\n`
        : undefined,
  };
}
