import { chmodSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { defineConfig, type Plugin } from 'vite';

const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };

/** Lets the built command be run by its name. */
const runnable: Plugin = {
  name: 'runnable',
  writeBundle({ dir = '' }) {
    chmodSync(join(dir, 'cli.js'), 0o755);
  },
};

/**
 * Three entries, the command, the worker that it starts and the library, with
 * what is seldom used in chunks that load only when used. pdfjs-dist stays
 * outside: it finds its worker, character maps and fonts by path.
 */
export default defineConfig({
  publicDir: false,
  plugins: [runnable],
  define: { __TALLYSTICK_VERSION__: JSON.stringify(version) },
  build: {
    ssr: true,
    target: 'node20',
    outDir: 'dist',
    minify: false,
    rollupOptions: {
      input: { cli: 'src/cli/main.ts', worker: 'src/cli/worker.ts', index: 'src/index.ts' },
      external: [/^pdfjs-dist/, /^node:/],
      output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name].js' },
    },
  },
  ssr: { noExternal: true },
});
