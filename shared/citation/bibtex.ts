import { toCsl } from './csl.ts';
import { oneLine, type CitationRecord } from './record.ts';

/** What each character that means something to TeX is written as. */
const escapes: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}', '{': '\\{', '}': '\\}', '&': '\\&', '%': '\\%', $: '\\$', '#': '\\#', _: '\\_',
  '~': '\\textasciitilde{}', '^': '\\textasciicircum{}', '<': '\\textless{}', '>': '\\textgreater{}', '|': '\\textbar{}', '"': '\\textquotedbl{}',
  '`': '\\textasciigrave{}',
};

/** Text for a BibTeX field. Hyphens and apostrophes in a row are kept apart, or TeX would set them as one sign. */
const tex = (text: string): string => oneLine(text).replace(/[\\{}&%$#_~^<>|"`]/g, (c) => escapes[c] ?? c).replace(/(['-])(?=\1)/g, '$1{}');

/**
 * The record as a BibTeX entry. `@misc`, because older styles know no `@dataset`. Title and names stand in a second pair
 * of braces: no style may lower their letters, and a name is never taken apart.
 */
export const bibtexText = (record: CitationRecord): string => {
  const item = toCsl(record);
  const [year, month] = item.issued['date-parts'][0];
  const fields: [string, string][] = [
    ['author', item.author.map(({ literal }) => `{${tex(literal)}}`).join(' and ')],
    ['title', `{${tex(item.title)}}`],
    ['year', String(year)],
    ['month', String(month)],
    ['publisher', tex(item.publisher)],
    ['howpublished', 'Data set'],
    ['version', item.version],
    ['number', tex(item.number)],
    ...(item.DOI ? [['doi', item.DOI] as [string, string]] : []),
    ['url', item.URL],
    ['note', tex(item.note)],
  ];
  return `@misc{${item.id},\n${fields.map(([name, value]) => `  ${name} = {${value}},\n`).join('')}}\n`;
};
