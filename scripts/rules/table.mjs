/**
 * Who may import whom. A room is a folder at the top of the repository; `rooms` are those it may reach besides itself, and
 * `packages` the packages from outside (absent: any).
 */
export const rooms = {
  protocols: { rooms: [], packages: ['temporal-polyfill'], why: 'the core is pure: only itself and the time library' },
  shared: { rooms: ['protocols'], packages: ['zod'], why: 'shared is what both sides say: protocols and zod only' },
  server: {
    rooms: ['shared', 'protocols'],
    why: 'the server knows shared and protocols, never the client or the worker',
  },
  jobs: {
    rooms: ['shared', 'protocols'],
    parts: ['server/models', 'server/commands', 'server/queries', 'server/mail', 'server/env', 'server/db'],
    why: 'the worker knows shared, protocols and server/{models,commands,queries,mail,env,db}',
  },
  lib: { rooms: ['shared', 'protocols'], client: true, why: 'lib is the lowest layer of the client' },
  hooks: { rooms: ['lib', 'shared', 'protocols'], client: true, why: 'hooks import downwards: lib, shared, protocols' },
  components: {
    rooms: ['hooks', 'lib', 'shared', 'protocols'],
    client: true,
    why: 'components import downwards: hooks, lib, shared, protocols',
  },
  app: {
    rooms: ['components', 'hooks', 'lib', 'shared', 'protocols'],
    client: true,
    why: 'app imports downwards: components, hooks, lib, shared, protocols',
  },
  scripts: {
    rooms: ['server', 'jobs', 'shared', 'protocols', 'lib', 'hooks', 'components', 'app'],
    why: 'scripts may use everything but the tests',
  },
};

/** Parts of components that know no feature, and the parts that each of them may reach. */
export const plainParts = {
  theme: ['theme'],
  ui: ['ui', 'theme'],
  charts: ['charts', 'ui', 'theme'],
};

/** Files of shared that bring zod with them: the client may have their types only. */
export const withZod = ['shared/contracts', 'shared/routes'];

/** Packages that belong to the server: on a phone they are dead weight or don't run. */
export const serverPackages = [
  'express',
  'pg',
  'sequelize',
  'umzug',
  'lucia',
  'nodemailer',
  'pino',
  'ical-generator',
  '@node-rs/argon2',
];
