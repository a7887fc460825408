import path from 'node:path';
import { defineConfig } from 'vitest/config';

const root = import.meta.dirname;
const alias = [{ find: /^@\//, replacement: `${root}/` }];

export default defineConfig({
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'unit',
          environment: 'node',
          include: ['tests/{protocols,published,shared,scripts}/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/{api,jobs,server}/**/*.test.ts'],
          globalSetup: ['tests/support/database-server.ts'],
          testTimeout: 30_000,
          hookTimeout: 90_000,
        },
      },
      {
        resolve: {
          alias: [
            ...alias,
            { find: /^react-native$/, replacement: 'react-native-web' },
            { find: /^expo-router$/, replacement: path.join(root, 'tests/support/expo-router.tsx') },
          ],
          extensions: ['.web.tsx', '.web.ts', '.web.js', '.tsx', '.ts', '.mjs', '.js', '.json'],
          mainFields: ['browser', 'module', 'main'],
        },
        define: { __DEV__: 'true', 'process.env.EXPO_OS': '"web"' },
        test: {
          name: 'ui',
          environment: 'jsdom',
          include: ['tests/ui/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/ui-setup.ts'],
          server: { deps: { inline: [/react-native/, /@expo-google-fonts/, /expo-font/] } },
        },
      },
    ],
  },
});
