import { defineConfig } from 'vitest/config';

/** `npm run bench`: prints ratios against a baseline in the same run, never times. */
export default defineConfig({
  test: { include: ['test/**/*.bench.ts'], testTimeout: 600_000, fileParallelism: false },
});
