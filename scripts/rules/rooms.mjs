import path from 'node:path';

import { plainParts, rooms, serverPackages, withZod } from './table.mjs';

const root = path.resolve(import.meta.dirname, '../..');
const isIn = (file, folder) => file === folder || file.startsWith(`${folder}/`);

/** The file meant by an import, from the root of the repository, or null for a package. */
export function target(from, specifier) {
  if (specifier.startsWith('@/')) return path.posix.normalize(specifier.slice(2));
  if (specifier.startsWith('.')) return path.posix.join(path.posix.dirname(from), specifier);
  return null;
}

const bringsZod = (file) => withZod.some((part) => isIn(file, part));
/** Files that end up in the browser, where zod would cost a quarter of the first load. */
const reachesClient = (from) => rooms[from.split('/')[0]].client || (isIn(from, 'shared') && !bringsZod(from));

function packageProblem(from, specifier, typeOnly) {
  const room = rooms[from.split('/')[0]];
  const name = specifier.split('/', specifier.startsWith('@') ? 2 : 1).join('/');
  if (room.packages && !room.packages.includes(name)) return `${room.why} (not ${specifier})`;
  if (name === 'zod' && !typeOnly && reachesClient(from)) return 'the client has no zod at run time: import type';
  if (!room.client) return null;
  if (specifier.startsWith('node:')) return `the client runs in a browser: no ${specifier}`;
  return serverPackages.includes(name) ? `${name} belongs to the server` : null;
}

function insideComponents(from, to) {
  const [, part] = from.split('/');
  const allowed = plainParts[part];
  if (!allowed || isIn(to, 'shared') || isIn(to, 'lib') || isIn(to, 'protocols')) return null;
  if (allowed.some((other) => isIn(to, `components/${other}`))) return null;
  return `components/${part} knows no feature: only ${allowed.map((other) => `components/${other}`).join(', ')}`;
}

/** What is wrong with this import, in a sentence, or null. `from` is relative to the root of the repository. */
export function problem(from, specifier, typeOnly) {
  const home = from.split('/')[0];
  if (home === 'tests') return null;
  const room = rooms[home];
  const to = target(from, specifier);
  if (to !== null && isIn(to, 'tests')) return 'nothing imports tests';
  if (!room) return null;
  if (to === null) return packageProblem(from, specifier, typeOnly);
  const there = to.split('/')[0];
  const reachable = there === home || room.rooms.includes(there) || (room.parts ?? []).some((part) => isIn(to, part));
  if (!reachable && !(home === 'scripts' && !(there in rooms))) return `${home} may not import ${there}: ${room.why}`;
  if (there !== home && specifier.startsWith('.')) return `another room is imported as '@/${to}'`;
  if (!typeOnly && bringsZod(to) && reachesClient(from)) return `${to} brings zod along: import type`;
  return home === 'components' ? insideComponents(from, to) : null;
}

const onlyTypes = (node, kind, specifiers) =>
  node[kind] === 'type' || (specifiers.length > 0 && specifiers.every((one) => one[kind] === 'type'));

/** ESLint rule: every way to name another file (import, export from, import(), a type's import) keeps to the table. */
export const roomsRule = {
  meta: { type: 'problem', schema: [], messages: { room: '{{ sentence }}' } },
  create(context) {
    const from = path.relative(root, context.filename).split(path.sep).join('/');
    const check = (node, source, typeOnly) => {
      if (typeof source?.value !== 'string') return;
      const sentence = problem(from, source.value, typeOnly);
      if (sentence) context.report({ node, messageId: 'room', data: { sentence } });
    };
    return {
      ImportDeclaration: (node) => check(node, node.source, onlyTypes(node, 'importKind', node.specifiers)),
      ExportNamedDeclaration: (node) => check(node, node.source, onlyTypes(node, 'exportKind', node.specifiers)),
      ExportAllDeclaration: (node) => check(node, node.source, node.exportKind === 'type'),
      ImportExpression: (node) => check(node, node.source, false),
      TSImportType: (node) => check(node, node.source ?? node.argument?.literal ?? node.argument, true),
      "CallExpression[callee.name='require']": (node) => check(node, node.arguments[0], false),
    };
  },
};
