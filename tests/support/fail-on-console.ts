import { afterEach, beforeEach, expect, vi } from 'vitest';

const methods = ['log', 'info', 'warn', 'error', 'debug', 'trace'] as const;
let heard: string[] = [];

/** A test that prints has found something it does not name: it fails, with what was printed. */
beforeEach(() => {
  heard = [];
  for (const method of methods) {
    vi.spyOn(console, method).mockImplementation((...args: unknown[]) => {
      heard.push(`console.${method}: ${args.map((arg) => (arg instanceof Error ? (arg.stack ?? arg.message) : String(arg))).join(' ')}`);
    });
  }
});

afterEach(() => {
  const printed = heard;
  heard = [];
  vi.restoreAllMocks();
  expect(printed, 'the test printed to the console').toEqual([]);
});
