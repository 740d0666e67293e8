/** ESLint rule `house/rooms`: imports obey the tables of eslint/house.js. Paths are resolved, so '../../' hides nothing. */
import { isBuiltin } from 'node:module';
import { dirname, join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { manifest, packages, rooms, strangers } from './house.js';

const root = fileURLToPath(new URL('..', import.meta.url));
const roomNames = Object.keys(rooms).sort((a, b) => b.length - a.length);
const inside = (path, folder) => path === folder || path.startsWith(`${folder}/`);
const startsLike = (path, start) => inside(path, start) || path.startsWith(`${start}.`);

/** The deepest room that holds a path, or undefined (tests, configuration). */
export const roomOf = (path) => roomNames.find((room) => inside(path, room));

const packageOf = (specifier) =>
  specifier.startsWith('node:') || isBuiltin(specifier)
    ? 'node:'
    : specifier
        .split('/')
        .slice(0, specifier.startsWith('@') ? 2 : 1)
        .join('/');

/** Why `file` (from the root) may not import `specifier` as 'value', 'type' or 'url'; null if it may. */
export function refusal(file, specifier, kind) {
  if (specifier.startsWith('.')) return refuseOwn(file, specifier.replace(/\?.*$/, ''), kind);
  return refusePackage(file, packageOf(specifier), kind);
}

function refuseOwn(file, specifier, kind) {
  const from = roomOf(file);
  if (from === undefined) return null;
  const path = join(dirname(file), specifier).split(sep).join('/');
  for (const pair of strangers) {
    if (startsLike(file, pair.from) && startsLike(path, pair.to)) return `${pair.from} must not know ${pair.to}`;
  }
  const to = roomOf(path);
  if (to === from) return null;
  const row = rooms[from];
  if (kind === 'type' && row.includes(`type:${path.replace(/\.ts$/, '')}`)) return null;
  if (kind === 'url' && row.includes(`url:${path}`)) return null;
  if (to === undefined) return path === manifest && inside(file, 'app') ? null : `${path} is outside the rooms of the house`;
  if (!row.includes(to)) return `${from} must not import ${to}`;
  const throughIndex = [to, `${to}/index`, `${to}/index.ts`].includes(path);
  return throughIndex || inside(to, from) || to === 'samples' || to === 'main' ? null : `${to} is entered only through its index`;
}

function refusePackage(file, name, kind) {
  const from = roomOf(file);
  if (from === undefined) return name === 'electron' && kind !== 'type' ? 'electron is imported only in main/desktop' : null;
  const rule = packages[name];
  if (rule === undefined) return `${name} is not among the packages that the house uses`;
  const allowed = rule.in.some((room) => inside(file, room)) && !(rule.notIn ?? []).some((start) => startsLike(file, start));
  return allowed ? null : `${name === 'node:' ? 'modules of Node are' : `${name} is`} not for ${from}`;
}

const isTypeOnly = (node) =>
  node.importKind === 'type' ||
  node.exportKind === 'type' ||
  (node.specifiers?.length > 0 && node.specifiers.every((specifier) => specifier.importKind === 'type'));

const isMetaUrl = (node) =>
  node?.type === 'MemberExpression' && node.object.type === 'MetaProperty' && node.property.name === 'url';

export const roomsRule = {
  meta: { type: 'problem', schema: [], messages: { refused: '{{reason}} (the house rules stand in eslint/house.js).' } },
  create(context) {
    const file = relative(root, context.filename).split(sep).join('/');
    const check = (node, source, kind) => {
      if (source?.type !== 'Literal' || typeof source.value !== 'string') return;
      const reason = refusal(file, source.value, kind);
      if (reason !== null) context.report({ node, messageId: 'refused', data: { reason } });
    };
    const checkStatement = (node) => check(node, node.source, isTypeOnly(node) ? 'type' : 'value');
    return {
      ImportDeclaration: checkStatement,
      ExportNamedDeclaration: checkStatement,
      ExportAllDeclaration: checkStatement,
      ImportExpression: (node) => check(node, node.source, 'value'),
      TSImportType: (node) => check(node, node.source ?? node.argument?.literal ?? node.argument, 'type'),
      NewExpression(node) {
        if (node.callee.name === 'URL' && isMetaUrl(node.arguments[1])) check(node, node.arguments[0], 'url');
      },
    };
  },
};
