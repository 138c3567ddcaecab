import { defineConfig } from 'vitest/config';

/**
 * Two entries, one bundle each with lazy chunks beside them: the command and the
 * library. pdfjs-dist stays outside, since it finds its worker, character maps
 * and fonts by path.
 */
export default defineConfig({
  build: {
    ssr: true,
    target: 'node20',
    outDir: 'dist',
    minify: false,
    rollupOptions: {
      input: { cli: 'src/cli/main.ts', index: 'src/index.ts' },
      external: [/^pdfjs-dist/, /^node:/],
      output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name].js' },
    },
  },
  ssr: { noExternal: true },
  test: { include: ['test/**/*.test.ts'], testTimeout: 60_000 },
});
