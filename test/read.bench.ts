import { existsSync, readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { tableOf } from './ratios.ts';
import { buildLibrary, costOfPass, least } from './reading-cost.ts';

/** PDFs of the material folder, if present, or else our own. */
const FOLDERS = ['../../shared/corpus/pairs/', '../../shared/corpus/pdf/']
  .map((folder) => new URL(folder, import.meta.url))
  .filter((folder) => existsSync(folder));
const OWN = new URL('../fixtures/manuscripts/', import.meta.url);

function pdfsIn(folder: URL): readonly string[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith('.pdf'))
    .map((file) => new URL(file, folder).pathname);
}

const ROUNDS = 3;

test('what reading and extracting cost beside the bare characters of all pages', async () => {
  await buildLibrary();
  for (const folder of FOLDERS.length === 0 ? [OWN] : FOLDERS) {
    const files = pdfsIn(folder);
    const passes = Array.from({ length: ROUNDS }, () => ({
      bare: costOfPass(files, 'bare'),
      whole: costOfPass(files, 'whole'),
    }));
    const bare = least(passes.map((pass) => pass.bare));
    const whole = least(passes.map((pass) => pass.whole));
    console.log(tableOf(`${files.length} PDFs of ${folder.pathname.split('/').at(-2)}`, [
      ['reading and extracting over bare getTextContent', whole.milliseconds / bare.milliseconds],
      ['the same by the time of the processor', whole.processorMilliseconds / bare.processorMilliseconds],
      ['peak memory over that of the bare pass', whole.megabytes / bare.megabytes],
    ]));
    expect(whole.milliseconds).toBeGreaterThan(0);
  }
});
