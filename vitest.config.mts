import { fileURLToPath } from 'node:url';

import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** Three projects, so that each part is tested in the surroundings it runs in. */
export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'models',
          environment: 'node',
          include: ['tests/models/**/*.test.ts'],
          testTimeout: 120_000,
        },
      },
      {
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/{contract,db,server}/**/*.test.ts'],
          testTimeout: 60_000,
        },
      },
      {
        resolve: {
          alias: [
            { find: /^@\//, replacement: `${here('./src')}/` },
            { find: /^react-native$/, replacement: 'react-native-web' },
            { find: /^@expo\/vector-icons\/.*/, replacement: here('./tests/support/vector-icons-stub.tsx') },
          ],
          extensions: ['.web.tsx', '.web.ts', '.web.js', '.tsx', '.ts', '.mjs', '.js', '.json'],
          mainFields: ['browser', 'module', 'main'],
        },
        test: {
          name: 'src',
          environment: 'jsdom',
          include: ['tests/src/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/setup-dom.ts'],
          server: { deps: { inline: [/react-native/, /expo/, /victory/] } },
        },
      },
    ],
  },
});
