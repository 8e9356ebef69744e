import path from 'node:path';
import { defineConfig } from 'vitest/config';

const root = path.resolve(import.meta.dirname, '..');

export default defineConfig({
  root,
  resolve: {
    alias: { '@': root, 'server-only': path.join(root, 'node_modules/server-only/empty.js') },
  },
  test: {
    include: ['{lib,policies,db,jobs,components}/**/*.test.{ts,tsx}', 'tests/published/**/*.test.ts', 'tests/faults/**/*.test.ts', 'tests/support/**/*.test.ts'],
    benchmark: { include: ['tests/bench/**/*.bench.ts'] },
    globalSetup: 'tests/support/template-db.ts',
    pool: 'threads',
    testTimeout: 20_000,
    env: { TZ: process.env.TZ ?? 'UTC', NODE_ENV: 'test' },
  },
});
