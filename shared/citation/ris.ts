import { toCsl } from './csl.ts';
import { keywordsOf, oneLine, type CitationRecord } from './record.ts';

const two = (n: number): string => String(n).padStart(2, '0');

/**
 * The record as RIS. Every value is one line with single spaces: neither a line end nor "ER  - " inside a title can end
 * the reference or begin another field, also for readers that look for tags within a line.
 */
export const risText = (record: CitationRecord): string => {
  const item = toCsl(record);
  const [year, month, day] = item.issued['date-parts'][0];
  const lines: [string, string][] = [
    ['TY', 'DATA'],
    ...item.author.map(({ literal }) => ['AU', literal] as [string, string]),
    ['TI', item.title],
    ['PY', String(year)],
    ['DA', `${year}/${two(month)}/${two(day)}/`],
    ['PB', item.publisher],
    ['ET', item.version],
    ['AN', item.number],
    ...(item.DOI ? [['DO', item.DOI] as [string, string]] : []),
    ['UR', item.URL],
    ['AB', item.abstract],
    ...keywordsOf(record).map((word) => ['KW', word] as [string, string]),
    ['N1', item.note],
  ];
  return [...lines.map(([tag, value]) => `${tag}  - ${oneLine(value)}`), 'ER  - ', ''].join('\r\n');
};
