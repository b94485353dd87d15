import { defineConfig } from 'vitest/config';

// biome-ignore lint/style/noDefaultExport: vitest reads its config from the default export
export default defineConfig({
  test: { include: ['tests/**/*.test.ts'], testTimeout: 120_000, setupFiles: ['tests/support/fixed-seed.ts'], maxWorkers: '100%' },
});
