import { defineConfig } from 'vite';

/**
 * Two entries, the command and the library, with what is seldom used in chunks
 * that load only when used. pdfjs-dist stays outside: it finds its worker,
 * character maps and fonts by path.
 */
export default defineConfig({
  publicDir: false,
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
});
