import { describe, expect, test } from 'vitest';
import { faultInWords } from '../src/cli/fault.ts';
import { screenOf, screenOfFile, type Surroundings } from '../src/cli/screen-of.ts';

const TERMINAL: Surroundings = {
  columns: 100, isTerminal: true, colourDepth: 8, environment: { LANG: 'en_GB.UTF-8' },
  platform: 'linux',
};
const OPTIONS = { color: true, plain: false };

describe('the screen that the command writes for', () => {
  test('is the terminal as it is', () => {
    expect(screenOf(TERMINAL, OPTIONS))
      .toEqual({ columns: 100, colours: 2, unicode: true, drawings: true });
  });

  test.each([
    ['--no-color', TERMINAL, { ...OPTIONS, color: false }],
    ['NO_COLOR', { ...TERMINAL, environment: { NO_COLOR: '1' } }, OPTIONS],
    ['a pipe', { ...TERMINAL, isTerminal: false }, OPTIONS],
    ['a terminal without colours', { ...TERMINAL, colourDepth: 1 }, OPTIONS],
  ])('has no colours with %s', (_, surroundings, options) => {
    expect(screenOf(surroundings, options).colours).toBe(0);
  });

  test('an empty NO_COLOR asks for nothing', () => {
    const environment = { NO_COLOR: '', LANG: 'C.UTF-8' };
    expect(screenOf({ ...TERMINAL, environment }, OPTIONS).colours).toBe(2);
  });

  test('has 80 columns in a pipe, or as many as COLUMNS names', () => {
    const pipe = { ...TERMINAL, columns: undefined, isTerminal: false };
    expect(screenOf(pipe, OPTIONS).columns).toBe(80);
    expect(screenOf({ ...pipe, environment: { COLUMNS: '60' } }, OPTIONS).columns).toBe(60);
    expect(screenOf({ ...pipe, environment: { COLUMNS: 'many' } }, OPTIONS).columns).toBe(80);
  });

  test('draws with typed characters where others may not be shown', () => {
    const unicode = (environment: Record<string, string>, platform = 'linux'): boolean =>
      screenOf({ ...TERMINAL, environment, platform }, OPTIONS).unicode;
    expect(unicode({ LANG: 'C' })).toBe(false);
    expect(unicode({})).toBe(false);
    expect(unicode({ LC_ALL: 'C', LANG: 'en_GB.UTF-8' })).toBe(false);
    expect(unicode({ LC_CTYPE: 'UTF-8' })).toBe(true);
    expect(unicode({ LANG: 'en_GB.UTF-8', TERM: 'linux' })).toBe(false);
    expect(unicode({}, 'win32')).toBe(false);
    expect(unicode({ WT_SESSION: 'a' }, 'win32')).toBe(true);
  });

  test('draws nothing with --plain', () => {
    expect(screenOf(TERMINAL, { ...OPTIONS, plain: true }).drawings).toBe(false);
    expect(screenOfFile({ plain: true }))
      .toEqual({ columns: 80, colours: 0, unicode: true, drawings: false });
  });
});

describe('a fault of our own', () => {
  test('asks to be reported, with where it happened', () => {
    const words = faultInWords(new RangeError('too deep'));
    expect(words).toContain('Please report these lines');
    expect(words).toContain('RangeError: too deep');
    expect(words).toMatch(/\n\s+at .*cli-screen\.test\.ts/);
  });
});
