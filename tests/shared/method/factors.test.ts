/** A kept factor saves time and changes nothing: same bits with and without, and whatever is wrong with it is noticed. */
import { describe, expect, test } from 'vitest';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { packFactor, unpackFactor, type FactorStore } from '#shared/method/factors.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { lineGates, linePatches, makeRegister } from '#tests/shared/method/chain/made-register.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, pairGates, seeded, slowProbabilities } from '#tests/shared/method/made.ts';

interface Recording extends FactorStore {
  held: Map<string, Uint8Array>;
  found: string[];
  stored: string[];
}

function recording(held = new Map<string, Uint8Array>()): Recording {
  const store: Recording = {
    held, found: [], stored: [],
    get: (key) => {
      const bytes = held.get(key) ?? null;
      if (bytes) store.found.push(key);
      return bytes;
    },
    put: (key, bytes) => {
      held.set(key, bytes);
      store.stored.push(key);
    },
  };
  return store;
}

const gates = pairGates('cz');
const circuits = drawCircuits(gates, [4, 8, 12, 16], 500, seeded('factors'));
const set = idealGateSet(gates, [0, 1]);

function countedAs(name: string): Dataset {
  const g = seeded(name);
  return dataset(gates, drawCounts(circuits, slowProbabilities(set, makeNoisy(set, 0.01, 0.002, 0.02, g), circuits), 2, 1000, g));
}

const turned = (bytes: Uint8Array, at: number): Uint8Array => bytes.map((b, i) => (i === at ? b ^ 1 : b));

const bits = (data: Dataset, factors: FactorStore | null): string => {
  const { result, replicates } = estimate({ dataset: data, contentId: 'kept', gateClass: null, replicates: 8, factors });
  return `${canonicalJson(result)} ${Buffer.from(replicates.values.buffer).toString('base64')}`;
};

describe('a pair of 1,263 parameters', () => {
  const store = recording();
  const first = countedAs('first');
  const second = countedAs('second');
  const fresh = bits(second, null);

  test('the first dataset on a design puts its factor by', () => {
    expect(bits(first, store)).toBe(bits(first, null));
    expect(store.stored).toHaveLength(1);
    expect(store.held.get(store.stored[0]!)!.length).toBe(32 + (1263 * 1264) / 2 * 8 + 32);
  });

  test('the second one takes it: nothing is stored anew, and every bit is as without', () => {
    expect(bits(second, store)).toBe(fresh);
    expect(store.found).toEqual(store.stored);
  });

  test('the judgement of the design at drawing keeps the same factor under the same key', () => {
    const drawn = recording();
    const judged = judgeDesign({ gates, qubits: [0, 1], circuits }, drawn);
    expect([judged.rank, judged.gaugeDimension]).toEqual([1023, 240]);
    const [key] = store.stored;
    expect(drawn.stored).toEqual([key]);
    expect(Buffer.from(drawn.held.get(key!)!).equals(Buffer.from(store.held.get(key!)!))).toBe(true);
  });

  test('with one bit turned it is worked out afresh and stored again', () => {
    const [key] = store.stored;
    const good = store.held.get(key!)!;
    const spoilt = recording(new Map([[key!, turned(good, 5000)]]));
    expect(bits(second, spoilt)).toBe(fresh);
    expect(spoilt.stored).toEqual([key]);
    expect(Buffer.from(spoilt.held.get(key!)!).equals(Buffer.from(good))).toBe(true);
  });

  test('circuits in another order are another design', () => {
    const other = recording(store.held);
    const judged = judgeDesign({ gates, qubits: [0, 1], circuits: [...circuits].reverse() }, other);
    expect(judged.rank).toBe(1023);
    expect(other.found).toEqual([]);
    expect(other.stored).toHaveLength(1);
    expect(other.stored).not.toEqual(store.stored);
  });
});

test('a pair of a chained register keeps its judgement, some hundred bytes, and the result its bits', () => {
  const line = makeRegister('kept line', lineGates(2), linePatches(2, 120, 300));
  const store = recording();
  const fresh = bits(line, null);
  expect(bits(line, store)).toBe(fresh);
  expect(store.stored).toHaveLength(1);
  expect(store.held.get(store.stored[0]!)!.length).toBe(64);
  expect(bits(line, store)).toBe(fresh);
  expect(store.found).toEqual(store.stored);
});

test('one qubit is never kept: its SVD takes milliseconds and its whole spectrum is published', () => {
  const store = recording();
  const g = seeded('one');
  const own = [{ label: 'x', targets: [0], ideal: { gate: 'rx', params: [Math.PI / 2] } }, { label: 'y', targets: [0], ideal: { gate: 'ry', params: [Math.PI / 2] } }];
  const drawn = drawCircuits(own, [2, 4, 8], 60, g);
  const local = idealGateSet(own, [0]);
  bits(dataset(own, drawCounts(drawn, slowProbabilities(local, makeNoisy(local, 0.01, 0.01, 0.02, g), drawn), 1, 100, g)), store);
  expect(store.stored).toEqual([]);
});

test('a factor is read under its own key and size only', () => {
  const packed = packFactor('here', { columns: 2, gaugeDimension: 1, sigma1: 3, sigmaR: 0.5, lower: Float64Array.of(1, 2, 3) });
  expect(unpackFactor('here', packed, 2)).toEqual({ columns: 2, gaugeDimension: 1, sigma1: 3, sigmaR: 0.5, lower: Float64Array.of(1, 2, 3) });
  const inside = Buffer.concat([Buffer.of(1, 2, 3), packed]).subarray(3);
  expect(unpackFactor('here', inside, 2)).toEqual(unpackFactor('here', packed, 2));
  expect(unpackFactor('there', packed, 2)).toBeNull();
  expect(unpackFactor('here', packed, 3)).toBeNull();
  const empty = packFactor('here', { columns: 2, gaugeDimension: 0, sigma1: 3, sigmaR: 0.5, lower: new Float64Array(0) });
  expect(empty).toHaveLength(64);
  expect(unpackFactor('here', empty, 2)?.lower).toEqual(new Float64Array(0));
});

test.each([0, 3, 8, 16, 24, 32, 55, 56, 87])('a bit turned in byte %i is noticed', (at) => {
  const packed = packFactor('here', { columns: 2, gaugeDimension: 1, sigma1: 3, sigmaR: 0.5, lower: Float64Array.of(1, 2, 3) });
  expect(unpackFactor('here', turned(packed, at), 2)).toBeNull();
});

test.each([0, 31, 63, 80, 87])('cut to %i bytes it is not taken', (length) => {
  const packed = packFactor('here', { columns: 2, gaugeDimension: 1, sigma1: 3, sigmaR: 0.5, lower: Float64Array.of(1, 2, 3) });
  expect(unpackFactor('here', packed.slice(0, length), 2)).toBeNull();
});
