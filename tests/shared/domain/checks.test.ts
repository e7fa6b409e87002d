import { describe, expect, it } from 'vitest';
import { checksOfEstimate, checksOfFile, checksWhileEstimating, estimateFailed, isBlocked, type ResultLook } from '#shared/domain/checks.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { angleInWords, gateInWords } from '#shared/domain/gate-words.ts';
import { boardReadings, byEstimate, registerFigure } from '#shared/domain/board-figures.ts';
import type { Dataset, Figure } from '#shared/formats/types.ts';

const dataset = (circuits: number, shots: number): Dataset => ({
  format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 't', gateClass: 'quarter-turn-1q/1', device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'spin' }, register: ['q0'], gates: [],
  patches: [{ qubits: [0], circuits: Array.from({ length: circuits }, (_, i) => ({ id: `c${i}`, gates: [], shots, counts: {} })) }],
  acquisition: { startedAt: '', endedAt: '', software: '' }, contributors: [], licence: 'CC-BY-4.0',
});
const file = (circuits: number, shots: number, sealed: number) =>
  checksOfFile({ dataset: dataset(circuits, shots), bytes: 41_234, gateClass: gateClassById('quarter-turn-1q/1'), sheet: { kind: 'matched', id: 'RS-000007' }, device: { found: true, sentence: 'Meadow-5' }, sealed: new Set(Array.from({ length: sealed }, (_, i) => `c${i}`)) });

const patch = { qubits: [0], columns: 43, gaugeDimension: 12, rank: 31, conditionRatio: 0.166, rankAmbiguous: false, complete: true, sound: true, settled: true, misfit: { residualSum: 1, expected: 1, sigmas: 0.5, pValue: 0.6 } };
const result: ResultLook = { replicates: 2000, figures: [], sealedCheck: { value: 0.0119, ideal: 0.0287, noise: 0.0104, z: 0.4, low99: 0.0078, high99: 0.0133, passed: true }, patches: [patch] };
const status = (checks: { id: string; status: string }[]): Record<string, string> => Object.fromEntries(checks.map((c) => [c.id, c.status]));
const blocks = (sigmas: number[]) => sigmas.map((s, i) => ({ block: i + 1, sigmas: s, circuits: 30 }));

describe('checks of a file', () => {
  it('count what is left to estimate from once the sealed circuits are taken out, against the floor', () => {
    expect(status(file(250, 500, 50))).toEqual({ format: 'passed', counts: 'passed', device: 'passed', 'run-sheet': 'passed', floor: 'passed' });
    expect(file(249, 500, 50).find((c) => c.id === 'floor')).toMatchObject({ status: 'note', blocking: false, detail: '199 is below the floor of 200 for this gate class: never ranked.' });
    expect(file(250, 499, 50).find((c) => c.id === 'floor')?.detail).toBe('499 shots is below the floor of 500 for this gate class: never ranked.');
  });

  it('block on a sheet that does not match and on a device that is not there, and on nothing else', () => {
    const base = { dataset: dataset(250, 500), bytes: 1, gateClass: null, sealed: new Set<string>() };
    expect(isBlocked(checksOfFile({ ...base, sheet: { kind: 'own-design' }, device: { found: true, sentence: '' } }))).toBe(false);
    expect(isBlocked(checksOfFile({ ...base, sheet: { kind: 'refused', id: 'RS-000007', why: 'x' }, device: { found: true, sentence: '' } }))).toBe(true);
    expect(isBlocked(checksOfFile({ ...base, sheet: { kind: 'own-design' }, device: { found: false, sentence: '' } }))).toBe(true);
    expect(isBlocked([estimateFailed('x')])).toBe(true);
  });
});

describe('checks of an estimate', () => {
  it('pass on a sound one and note what keeps another off the board, without blocking', () => {
    expect(status(checksOfEstimate(result, blocks([0.1, -1, 2])))).toEqual({ design: 'passed', settled: 'passed', bootstrap: 'passed', sealed: 'passed', misfit: 'passed', drift: 'passed' });
    const unsound = { ...patch, qubits: [0, 1], rank: 199, complete: false, sound: false, settled: false, misfit: null };
    expect(status(checksOfEstimate({ ...result, patches: [patch, unsound] }, [])), 'an unsound pair was not estimated: its design says so').toMatchObject({ design: 'note', settled: 'passed' });
    const poor = checksOfEstimate({ ...result, sealedCheck: { ...result.sealedCheck!, passed: false }, patches: [{ ...patch, sound: false, settled: false, misfit: { ...patch.misfit, sigmas: 12 } }] }, []);
    expect(status(poor)).toEqual({ design: 'note', settled: 'note', bootstrap: 'passed', sealed: 'note', misfit: 'note', drift: 'note' });
    expect(isBlocked(poor)).toBe(false);
  });

  it('hold the farthest block against the bound that the farthest of so many passes with 99 %: 2.81 for two, 3.23 for eight (recomputed with python statistics.NormalDist)', () => {
    const drift = (sigmas: number[]) => checksOfEstimate(result, blocks(sigmas)).find((c) => c.id === 'drift')?.status;
    expect([drift([0, 2.78]), drift([0, 2.83])]).toEqual(['passed', 'note']);
    expect([drift([3.2, 0, 0, 0, 0, 0, 0, 0]), drift([-3.25, 0, 0, 0, 0, 0, 0, 0])]).toEqual(['passed', 'note']);
  });

  it('show what runs and what waits while the estimate goes on', () => {
    const list = checksWhileEstimating(file(250, 500, 50), 'replicates', 1240, 2000);
    expect(list.find((c) => c.id === 'bootstrap')).toMatchObject({ status: 'running', detail: '1\u202f240 of 2\u202f000 replicates' });
    expect(list.find((c) => c.id === 'drift')).toMatchObject({ status: 'waiting' });
    expect(list.find((c) => c.id === 'format')).toMatchObject({ status: 'passed' });
  });
});

describe('words and readings', () => {
  it('write angles as parts of π and name gates', () => {
    expect([Math.PI / 2, -Math.PI / 4, Math.PI, (3 * Math.PI) / 4, 0, 0.3].map(angleInWords)).toEqual(['π/2', '−π/4', 'π', '3π/4', '0', '0.3 rad']);
    expect([gateInWords({ gate: 'id' }), gateInWords({ gate: 'rx', params: [Math.PI / 2] }), gateInWords({ gate: 'cz' }), gateInWords({ unitary: [] })]).toEqual(['identity', 'rx(π/2)', 'cz', 'a unitary of its own']);
  });

  it('take the figure of the whole register, and sort the better first with nulls last', () => {
    const f = (qubits: number[]): Figure => ({ key: 'error-per-gate', depth: null, gate: null, qubits, value: 1, standardError: null, intervals: null, firstOrder: null, determined: true, reason: null, extrapolated: false, firstOrderOnly: false, replicates: 1 });
    expect(registerFigure([f([0]), f([1])], boardReadings['error-per-gate'], 2)).toBeNull();
    expect(registerFigure([f([0]), f([0, 1])], boardReadings['error-per-gate'], 2)?.qubits).toEqual([0, 1]);
    expect([null, 0.2, 0.9].sort(byEstimate('higher'))).toEqual([0.9, 0.2, null]);
    expect([null, 0.9, 0.2].sort(byEstimate('lower'))).toEqual([0.2, 0.9, null]);
  });
});
