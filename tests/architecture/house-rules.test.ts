import { describe, expect, it } from 'vitest';
import { sourceFiles, textFiles } from '#tests/support/source-files.ts';

const files = sourceFiles();
/** Written by a program, never by hand. */
const generated = new Set(['shared/formats/validators.js', 'shared/linalg/wasm/kernel-bytes.ts']);
const own = files.filter(({ path }) => !generated.has(path));
const linesOf = (text: string): number => text.replace(/\n$/, '').split('\n').length;
const offenders = (list: typeof files, pattern: RegExp): string[] =>
  list.flatMap(({ path, text }) => text.split('\n').flatMap((line, i) => (pattern.test(line) ? [`${path}:${i + 1}: ${line.trim().slice(0, 120)}`] : [])));

describe('the house rules', () => {
  it('no file of code is longer than 300 lines', () => {
    expect(own.filter(({ text }) => linesOf(text) > 300).map(({ path, text }) => `${path}: ${linesOf(text)}`)).toEqual([]);
  });

  it('half of all files have at most 75 lines', () => {
    const lengths = own.map(({ text }) => linesOf(text)).sort((a, b) => a - b);
    expect(lengths[Math.floor(lengths.length / 2)]).toBeLessThanOrEqual(75);
  });

  it('only api/config reads the environment', () => {
    const elsewhere = own.filter(({ path }) => /^(api|shared|web)\//.test(path) && !path.startsWith('api/config/'));
    expect(offenders(elsewhere, /process\.env|import\.meta\.env/)).toEqual([]);
  });

  it('file names are in kebab-case', () => {
    expect(own.map(({ path }) => path).filter((path) => !/^[a-z0-9.-]+$/.test(path.split('/').at(-1) ?? ''))).toEqual([]);
  });

  it('nothing points out of the project, or at where it was written', () => {
    const self = 'tests/architecture/house-rules.test.ts';
    const texts = textFiles().filter(({ path }) => path !== self && !generated.has(path));
    expect(offenders(texts, /\/work\/|\.\.\/shared\/design|(^|[\s'"`(=])\/home\/[a-z]|registry\.npmjs\.org/)).toEqual([]);
  });

  it('nothing is left to be done later in a comment', () => {
    const self = 'tests/architecture/house-rules.test.ts';
    expect(offenders(own.filter(({ path }) => path !== self), /\b(TODO|FIXME|XXX|HACK)\b/)).toEqual([]);
  });

  it('no test is skipped or singled out', () => {
    expect(offenders(own.filter(({ path }) => path.startsWith('tests/') && path !== 'tests/architecture/house-rules.test.ts'), /\b(it|describe|test)\.(only|skip|todo)\b/)).toEqual([]);
  });

  it('only the tests and the command line speak to the console', () => {
    expect(offenders(own.filter(({ path }) => /^(api|shared|web)\//.test(path) && !path.startsWith('api/cli/')), /\bconsole\.\w+\(/)).toEqual([]);
  });
});
