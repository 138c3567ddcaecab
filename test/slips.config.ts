import { defineConfig } from 'vitest/config';

/** `npm run slips`: plants slips in texts whose results agree and prints what is found, by kind. */
export default defineConfig({
  test: { include: ['test/**/*.slips.ts'], testTimeout: 600_000, fileParallelism: false },
});
