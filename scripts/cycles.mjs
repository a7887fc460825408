// Finds import cycles, imports of types included: `node scripts/cycles.mjs` prints each one and exits with 1.
import madge from 'madge';

const rooms = ['app', 'components', 'hooks', 'lib', 'shared', 'protocols', 'server', 'jobs', 'scripts', 'tests'];

const graph = await madge(process.argv[2] ?? '.', {
  fileExtensions: ['ts', 'tsx'],
  tsConfig: 'tsconfig.json',
  includeNpm: false,
  excludeRegExp: [/^(node_modules|dist|build|\.expo|\.data|\.pg)\//],
  detectiveOptions: { ts: { skipTypeImports: false }, tsx: { skipTypeImports: false } },
});
const files = Object.keys(graph.obj());
const cycles = graph.circular();
for (const cycle of cycles) console.error(`cycle: ${[...cycle, cycle[0]].join(' -> ')}`);
console.log(`${files.filter((file) => rooms.includes(file.split('/')[0])).length} files, ${cycles.length} cycles`);
process.exit(cycles.length > 0 ? 1 : 0);
