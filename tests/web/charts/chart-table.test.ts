import { describe, expect, it } from 'vitest';
import { cell, toCsv } from '#web/charts/chart-table.ts';

const table = (...rows: ReturnType<typeof cell>[][]) => ({ caption: 'c', columns: [{ head: 'Device', csv: 'device' }, { head: 'Value', csv: 'value', numeric: true }], rows });

describe('numbers as a CSV file', () => {
  it('gives the exact number behind the rounded text', () => {
    expect(toCsv(table([cell('Meadow-5'), cell('0.9695', 0.96951234567)]))).toBe('device,value\r\nMeadow-5,0.96951234567\r\n');
  });

  it('quotes commas, quotes and line ends as RFC 4180 has it, and leaves null empty', () => {
    expect(toCsv(table([cell('a "b", c\nd'), cell('none', null)]))).toBe('device,value\r\n"a ""b"", c\nd",\r\n');
  });

  it('defuses text that a spreadsheet would run, but not numbers below zero', () => {
    expect(toCsv(table([cell('=cmd()'), cell('', -0.5)], [cell('@x'), cell('', 1)]))).toBe("device,value\r\n'=cmd(),-0.5\r\n'@x,1\r\n");
  });
});
