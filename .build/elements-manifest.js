import { readdirSync, readFileSync } from 'node:fs';
import { create, ts } from '@custom-elements-manifest/analyzer';
import { litPlugin } from '@custom-elements-manifest/analyzer/src/features/framework-plugins/lit/lit.js';

/** `custom-elements.json`: tags, attributes, events, slots and parts as editors read them, from the doc tags. */
export const elementsManifest = {
  name: 'elements-manifest',
  generateBundle() {
    const files = readdirSync('src/elements', { recursive: true }).filter(isDescribed);
    const modules = files.sort().map((file) => {
      const path = `src/elements/${file.replaceAll('\\', '/')}`;
      return ts.createSourceFile(path, readFileSync(path, 'utf8'), ts.ScriptTarget.ES2022, true);
    });
    const manifest = create({ modules, plugins: [...litPlugin(), definitions, asShipped] });
    this.emitFile({
      type: 'asset',
      fileName: 'custom-elements.json',
      source: `${JSON.stringify(manifest, null, 1)}\n`,
    });
  },
};

/** `define('brim-x', BrimX)` in a module says that it defines the tag. */
const definitions = {
  name: 'definitions',
  analyzePhase({ node, moduleDoc }) {
    if (!ts.isCallExpression(node) || node.expression.getText() !== 'define') return;
    const [tag, element] = node.arguments;
    moduleDoc.exports.push({
      kind: 'custom-element-definition',
      name: tag.text,
      declaration: {
        name: element.getText(),
        module: moduleDoc.path.replace(/\.ts$/, '.component.ts'),
      },
    });
  },
};

/** Readers find the built modules, not the sources. */
const asShipped = {
  name: 'as-shipped',
  packageLinkPhase({ customElementsManifest }) {
    const walk = (value) => {
      if (value === null || typeof value !== 'object') return;
      for (const [key, inner] of Object.entries(value)) {
        if ((key === 'path' || key === 'module') && typeof inner === 'string') value[key] = shipped(inner);
        else walk(inner);
      }
    };
    walk(customElementsManifest.modules);
  },
};

function shipped(path) {
  return path.replace(/^\/?src\//, 'dist/').replace(/\.ts$/, '.js');
}

/** `define.ts` defines whatever it is told, and so no tag of its own. */
function isDescribed(file) {
  return file.endsWith('.ts') && file !== 'define.ts';
}
