import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { drawingOf } from './draw.ts';

const FIXTURES = new URL('../fixtures/manuscripts/', import.meta.url);
const pdf = (path: string): Uint8Array => new Uint8Array(readFileSync(new URL(path, FIXTURES)));

test('the drawing of a page outlines its columns, blocks, lines and table cells', async () => {
  const svg = (await drawingOf(pdf('ferry-cohort.pdf'), 2)) ?? '';
  expect(svg).toMatch(/^<svg [^>]*viewBox="0 0 595\.\d+ 841\.\d+"/);
  expect(svg.match(/stroke-dasharray/g)?.length).toBeGreaterThanOrEqual(2);
  expect(svg).toContain('>table</text>');
  expect(svg).toContain('>paragraph</text>');
  expect(svg).toContain('<title>row 0, column 0');
  expect(svg.match(/<(?:rect|svg)/g)?.length).toBe(svg.match(/<\/(?:rect|svg)|fill="white"\/>/g)?.length);
});

test('numbers printed in the margin are told from counted ones', async () => {
  const svg = (await drawingOf(pdf('numbered/tex-by-fives.pdf'), 1)) ?? '';
  expect(svg).toContain('fill="#c53030">5</text>');
  expect(await drawingOf(pdf('numbered/tex-by-fives.pdf'), 99)).toBeUndefined();
});
