import { describe, expect, it } from 'vitest';
import { lastDay, scriptOf } from '#api/demo/acts/script.ts';
import { reasonToAccept } from '#api/demo/acts/words.ts';
import { demoDevices } from '#api/demo/devices.ts';
import { ordersOf, timesOf } from '#api/demo/foresight/orders.ts';
import { exchanges } from '#api/demo/plan/exchanges.ts';
import { stories } from '#api/demo/plan/index.ts';
import { contributorFor, curatorFor } from '#api/demo/plan/who.ts';
import { inventedOrganisations, inventedPeople } from '#api/fakes/people.ts';
import type { Check } from '#shared/contracts/common.ts';


const made = (id: string, status: Check['status']): Check => ({ id, status, title: id, detail: '', blocking: false });
const accepted = stories.filter(({ end }) => end.kind === 'frozen' || end.kind === 'run-again');
const publicOnes = accepted.filter(({ embargoUntil }) => embargoUntil === undefined || new Date(embargoUntil) < lastDay);
const used = new Set(stories.map(({ device }) => device));
const devices = demoDevices.filter(({ name }) => used.has(name));

describe('the plan of the demo registry', () => {
  it('has thirty public entries or more over two years, from five providers or more and a laboratory', () => {
    expect(publicOnes.length).toBeGreaterThanOrEqual(30);
    expect(stories[0]?.day.slice(0, 7)).toBe('2024-12');
    expect(stories.at(-1)?.day.slice(0, 7)).toBe('2026-11');
    const kinds = [...new Set(devices.map(({ provider }) => provider))].map((name) => inventedOrganisations.find((o) => o.name === name)?.kind);
    expect(kinds.filter((kind) => kind === 'provider').length).toBeGreaterThanOrEqual(5);
    expect(kinds.filter((kind) => kind === 'laboratory')).toHaveLength(1);
  });

  it('measures nine devices or more, of six modalities, in seven gate classes', () => {
    expect(devices.length).toBeGreaterThanOrEqual(9);
    expect([...new Set(devices.map(({ modality }) => modality))].sort()).toEqual(['neutral-atom', 'photonic', 'simulated', 'spin', 'superconducting', 'trapped-ion']);
    expect([...new Set(stories.map(({ gateClass }) => gateClass))].sort()).toEqual(['chained-cz-2q/1', 'chained-cz-3q/1', 'chained-cz-5q/1', 'clifford-t-1q/1', 'half-turn-1q/1', 'quarter-turn-1q/1', 'quarter-turn-cz-2q/1']);
  });

  it.each([['quarter-turn-1q/1', 10], ['clifford-t-1q/1', 3], ['quarter-turn-cz-2q/1', 3], ['chained-cz-2q/1', 3], ['chained-cz-3q/1', 2], ['chained-cz-5q/1', 1]])('gives the board of %s at least %i devices', (gateClass, least) => {
    expect(new Set(publicOnes.filter((s) => s.gateClass === gateClass).map((s) => s.device)).size).toBeGreaterThanOrEqual(least);
  });

  it('lets datasets rest in every state in which one can rest', () => {
    const kinds = new Set(stories.map(({ end }) => end.kind));
    expect([...kinds].sort()).toEqual(['blocked', 'cancelled', 'checking', 'declined', 'frozen', 'in-review', 'ready', 'returned', 'run-again']);
    const waiting = stories.filter(({ end }) => end.kind === 'in-review');
    expect(new Set(waiting.map(({ device }) => demoDevices.find((d) => d.name === device)?.provider)).size).toBeGreaterThanOrEqual(3);
    expect(stories.some(({ embargoUntil }) => embargoUntil !== undefined && new Date(embargoUntil) > lastDay)).toBe(true);
  });

  it('corrects only what was frozen before, on the same device and gate class', () => {
    const corrections = stories.filter(({ corrects }) => corrects !== undefined);
    expect(corrections.length).toBeGreaterThanOrEqual(2);
    for (const correction of corrections) {
      const first = stories.find(({ key }) => key === correction.corrects);
      expect(first).toMatchObject({ device: correction.device, gateClass: correction.gateClass });
      expect(first && timesOf(first).first.decided < timesOf(correction).first.received).toBe(true);
    }
  });

  it('draws keys, seeds and instants apart', () => {
    expect(new Set(stories.map(({ key }) => key)).size).toBe(stories.length);
    const acts = scriptOf(stories, lastDay);
    expect(new Set(acts.map(({ at }) => at.getTime())).size).toBe(acts.length);
    expect(acts.every(({ at }, i) => i === 0 || at >= (acts[i - 1]?.at ?? at))).toBe(true);
  });

  it('claims a case anew whose claim has lapsed when the demo is made, and only then', () => {
    const added = (now: string): string[] => scriptOf(stories, new Date(now)).slice(scriptOf(stories, lastDay).length).map(({ at, name }) => `${at.toISOString()} ${name}`);
    expect(added('2026-12-01T12:00:00Z')).toEqual([]);
    expect(added('2027-03-01T12:00:00Z')).toEqual(['2027-03-01T12:00:00.000Z quill-7-clifford-t-1q-1-2026-11-17: claim again']);
  });

  it('is the same each time it is made', () => {
    expect(ordersOf(stories, 1)).toEqual(ordersOf(stories, 1));
    expect(scriptOf(stories, lastDay).map(({ at, name }) => [at, name])).toEqual(scriptOf(stories, lastDay).map(({ at, name }) => [at, name]));
  });

  it('numbers the sheets in the order in which they are asked for, from the number given', () => {
    const issued = ordersOf(stories, 7).filter(({ ownDesign }) => !ownDesign);
    expect(issued.map(({ sheet }) => sheet.id)).toEqual(issued.map((_, i) => `RS-${String(7 + i).padStart(6, '0')}`));
    expect(issued.every(({ sheet }, i) => i === 0 || sheet.drawnAt > (issued[i - 1]?.sheet.drawnAt ?? ''))).toBe(true);
  });

  it('has every dataset reviewed by a curator of another organisation, and both curators of the office busy', () => {
    for (const story of stories) {
      const provider = demoDevices.find(({ name }) => name === story.device)?.provider ?? '';
      expect(curatorFor(story).organisation).not.toBe(contributorFor(provider).organisation);
      expect(curatorFor(story).roles).toContain('curator');
    }
    expect(new Set(stories.map((story) => curatorFor(story).subject)).size).toBe(2);
    expect(inventedPeople.filter(({ roles }) => roles.includes('curator')).length).toBeGreaterThan(2);
  });

  it('uses every exchange of letters once', () => {
    expect(stories.flatMap(({ exchange }) => exchange ?? []).sort((a, b) => a - b)).toEqual(exchanges.map((_, i) => i));
  });
});

describe('the reason of an acceptance', () => {
  const story = stories.find(({ exchange, corrects }) => exchange === undefined && corrects === undefined);
  if (!story) throw new Error('no plain story');

  it('names what the checks noted', () => {
    expect(reasonToAccept(story, [made('misfit', 'note'), made('sealed', 'note'), made('run-sheet', 'passed')])).toMatch(/^The sealed circuits were not predicted.*The counts do not fit one set of gates/);
    expect(reasonToAccept(story, [made('settled', 'note')])).toMatch(/^The estimate did not settle/);
  });

  it('says nothing of notes where there are none', () => {
    expect(reasonToAccept(story, [made('misfit', 'passed'), made('sealed', 'passed')])).not.toMatch(/note|not ranked/);
  });

  it('differs from entry to entry', () => {
    expect(new Set(accepted.map((s) => reasonToAccept(s, []))).size).toBeGreaterThan(6);
  });
});
