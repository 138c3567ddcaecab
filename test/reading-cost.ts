import { execFileSync } from 'node:child_process';
import { resolve } from 'node:path';
import { build } from 'vite';

/*
 * What reading costs is measured in processes of its own, so that neither the
 * test runner's memory nor its transformation of the source is counted.
 */

const ROOT = resolve(import.meta.dirname, '..');
const BUILT = resolve(ROOT, 'node_modules/.bench');

/** The cost of one pass over all files: by the clock, of the processor, and of memory at its most. */
export interface Cost {
  readonly milliseconds: number;
  /** Of all threads; other work on the machine disturbs it less than the clock. */
  readonly processorMilliseconds: number;
  readonly megabytes: number;
}

/** Builds reading and extracting as they are shipped, where its processes find their packages. */
export async function buildLibrary(): Promise<void> {
  await build({
    root: ROOT,
    configFile: resolve(ROOT, 'src/vite.config.ts'),
    logLevel: 'error',
    build: {
      outDir: BUILT,
      emptyOutDir: true,
      rollupOptions: { input: { read: 'src/read/index.ts', extract: 'src/extract/index.ts' } },
    },
  });
}

const BARE = `
  for (const name of ['DOMMatrix', 'ImageData', 'Path2D']) globalThis[name] ??= class {};
  process.env.DISABLE_SYSTEM_FONTS_LOAD = '1';
  const { getDocument } = await import('pdfjs-dist/legacy/build/pdf.mjs');
  const root = ${JSON.stringify(`${ROOT}/node_modules/pdfjs-dist/`)};
  const pass = async (bytes) => {
    const task = getDocument({ data: new Uint8Array(bytes), verbosity: 0, isEvalSupported: false,
      enableXfa: false, useSystemFonts: false, disableFontFace: true, stopAtErrors: false,
      standardFontDataUrl: root + 'standard_fonts/', cMapUrl: root + 'cmaps/', cMapPacked: true,
      wasmUrl: root + 'wasm/' });
    const document = await task.promise;
    for (let number = 1; number <= document.numPages; number++) {
      const page = await document.getPage(number);
      await page.getTextContent();
      page.cleanup();
    }
    await task.destroy();
  };`;

const WHOLE = `
  const { readManuscript } = await import(${JSON.stringify(`${BUILT}/read.js`)});
  const { extract } = await import(${JSON.stringify(`${BUILT}/extract.js`)});
  const pass = async (bytes) => extract(await readManuscript(bytes, 'a.pdf'));`;

const MEASURED = `
  const { existsSync, readFileSync } = await import('node:fs');
  const files = JSON.parse(readFileSync(0, 'utf8'));
  await pass(readFileSync(files[0]));
  const [clock, start] = [performance.now(), process.cpuUsage()];
  for (const file of files) await pass(readFileSync(file)).catch(() => {});
  const milliseconds = performance.now() - clock;
  const { user, system } = process.cpuUsage(start);
  // Linux counts the parent's memory into maxRSS; the high-water mark of its own is the process's
  const status = existsSync('/proc/self/status') ? readFileSync('/proc/self/status', 'utf8') : '';
  const kilobytes = Number(/VmHWM:\\s*(\\d+)/.exec(status)?.[1] ?? process.resourceUsage().maxRSS);
  console.log(JSON.stringify({ milliseconds, processorMilliseconds: (user + system) / 1000, megabytes: kilobytes / 1024 }));`;

/** One pass over the files: bare characters of all pages, or reading and extracting. */
export function costOfPass(files: readonly string[], what: 'bare' | 'whole'): Cost {
  const script = (what === 'bare' ? BARE : WHOLE) + MEASURED;
  const printed = execFileSync(process.execPath, ['--input-type=module', '-e', script], {
    cwd: ROOT,
    input: JSON.stringify(files),
    encoding: 'utf8',
    maxBuffer: 2 ** 24,
  });
  return JSON.parse(printed.trim().split('\n').at(-1) ?? '') as Cost;
}

/** The least of several passes, which noise disturbs least. */
export function least(costs: readonly Cost[]): Cost {
  return {
    milliseconds: Math.min(...costs.map(({ milliseconds }) => milliseconds)),
    processorMilliseconds: Math.min(...costs.map((cost) => cost.processorMilliseconds)),
    megabytes: Math.min(...costs.map(({ megabytes }) => megabytes)),
  };
}
