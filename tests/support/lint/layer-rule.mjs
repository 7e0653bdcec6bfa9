import { builtinModules } from 'node:module';
import { dirname, relative, resolve, sep } from 'node:path';

/**
 * The order of the layers: app → src → src/contract ← server → db, models. Every import is resolved to a
 * path from the project's root, then held against the first entry whose folder the importing file is in.
 * `ours` and `packages` say what may be imported; packages is left out where any may.
 */
const LAYERS = [
  {
    name: 'src/contract/enums.ts',
    ours: [],
    packages: [],
    advice: 'It is read by the database layer and stays free of imports.',
  },
  {
    name: 'src/contract',
    ours: ['src/contract'],
    packages: ['zod'],
    advice: 'The contract stands on zod alone, so that both ends can rest on it.',
  },
  {
    name: 'src/features',
    ours: ['src/contract', 'src/api', 'src/ui', 'src/session', 'src/lib', 'models/units'],
    ownFolder: true,
    advice:
      'A feature never imports another one: what two of them need belongs in src/ui, src/lib or src/api.',
  },
  {
    name: 'src',
    ours: ['src/contract', 'src/api', 'src/ui', 'src/session', 'src/lib', 'models/units'],
    advice:
      'Shared client code imports no feature and nothing of the server; of models only units.ts, of which there must be one copy.',
  },
  { name: 'app', ours: ['app', 'src'], advice: 'A route names its screen in src and nothing else.' },
  {
    name: 'server/features',
    ours: ['server', 'src/contract', 'db', 'models'],
    ownFolder: true,
    except: (path) => !path.startsWith('server/features/') || path.endsWith('/service'),
    node: true,
    advice: "Of another feature only its service.ts may be imported; the client's code never.",
  },
  {
    name: 'server',
    ours: ['server', 'src/contract', 'db', 'models'],
    node: true,
    advice: 'The server shares the contract with the client and nothing else.',
  },
  {
    name: 'db',
    ours: ['db', 'src/contract/enums'],
    packages: ['drizzle-orm', 'better-sqlite3'],
    node: true,
    advice: 'The database layer knows tables and queries: of ours it reads only src/contract/enums.ts.',
  },
  {
    name: 'models',
    ours: ['models'],
    packages: ['highs', 'javascript-lp-solver', 'mathjs', 'ml-matrix', 'd3-contour'],
    advice: 'The model imports nothing of ours, nothing of Node, and only mathematical packages.',
  },
];

const BUILT_IN = new Set(builtinModules);

/** @type {import('eslint').Rule.RuleModule} */
export const layerRule = {
  meta: {
    type: 'problem',
    schema: [{ type: 'object', properties: { root: { type: 'string' } } }],
    messages: { outside: '{{layer}} may not import {{target}}. {{advice}}' },
  },
  create(context) {
    const { root } = context.options[0];
    const from = toPath(relative(root, context.filename));
    const layer = LAYERS.find(({ name }) => from === name || from.startsWith(`${name}/`));
    if (!layer) return {};
    const check = (node) => {
      const source = node?.source ?? node;
      if (typeof source?.value !== 'string' || isAllowed(layer, from, source.value)) return;
      const data = { layer: layer.name, target: source.value, advice: layer.advice };
      context.report({ node: source, messageId: 'outside', data });
    };
    return {
      ImportDeclaration: check,
      ExportNamedDeclaration: (node) => node.source && check(node),
      ExportAllDeclaration: check,
      ImportExpression: check,
    };
  },
};

function isAllowed(layer, from, target) {
  if (target.startsWith('.')) return mayImportOurs(layer, from, toPath(resolve('/', dirname(from), target)));
  if (target.startsWith('@/')) return mayImportOurs(layer, from, `src/${target.slice(2)}`);
  const [first, second] = target.split('/');
  const isNode = target.startsWith('node:') || BUILT_IN.has(first);
  if (isNode) return layer.node === true;
  const packageName = first.startsWith('@') ? `${first}/${second}` : first;
  return layer.packages?.includes(packageName) ?? true;
}

function mayImportOurs(layer, from, target) {
  const isIn = (folder) => target === folder || target.startsWith(`${folder}/`);
  const path = target.replace(/\.(ts|tsx|mjs)$/, '');
  if (layer.ownFolder) {
    const [ownFolder] = from.match(/^\w+\/features\/[^/]+/) ?? [];
    if (isIn(ownFolder)) return true;
  }
  if (layer.except && !layer.except(path)) return false;
  return layer.ours.some((folder) => path === folder || path.startsWith(`${folder}/`));
}

/** With forward slashes and without the leading one. */
const toPath = (path) => path.split(sep).join('/').replace(/^\//, '');
