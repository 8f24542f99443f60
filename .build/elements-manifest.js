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
    const manifest = create({ modules, plugins: [...litPlugin(), definitions, onlyTold, asShipped] });
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

const toldAttributes = new Map();

/** What the doc tags tell is the contract; state, private members and events of the inside are none of it. */
const onlyTold = {
  name: 'only-told',
  analyzePhase({ node, moduleDoc }) {
    if (!ts.isClassDeclaration(node)) return;
    const element = moduleDoc.declarations.find(({ name }) => name === node.name?.text);
    const tags = ts.getJSDocTags(node).filter(({ tagName }) => tagName.text === 'attr');
    const names = tags.map(
      ({ comment }) =>
        String(comment)
          .replace(/^\{[^}]*\}\s*/, '')
          .split(' ')[0],
    );
    if (element) toldAttributes.set(`${moduleDoc.path} ${element.name}`, new Set(names));
  },
  packageLinkPhase({ customElementsManifest }) {
    for (const { declarations, path } of customElementsManifest.modules) {
      for (const element of declarations.filter(({ customElement }) => customElement)) {
        element.events = element.events?.filter(({ name }) => name?.startsWith('brim-'));
        const names = toldAttributes.get(`${path} ${element.name}`);
        element.attributes = element.attributes?.filter(({ name }) => names?.has(name));
        const told = new Set(element.attributes?.map(({ fieldName, name }) => fieldName ?? name));
        element.members = element.members?.filter(
          ({ name, privacy, attribute, description, inheritedFrom }) =>
            !name.startsWith('#') &&
            (inheritedFrom === undefined || told.has(name)) &&
            (privacy ?? 'public') === 'public' &&
            (description !== undefined || (attribute !== undefined && told.has(name))),
        );
      }
    }
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
