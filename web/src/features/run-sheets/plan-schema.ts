import { z } from 'zod';
import { runSheetCreate } from '#shared/contracts/run-sheets.ts';
import { sheetKinds, type SheetKind } from '#shared/domain/sheet-kinds.ts';
import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';

/** What the fields of the plan hold: text as typed, so that a wrong value can be named back. */
export interface PlanFields {
  device: string;
  gateClass: string;
  register: string[];
  kind: SheetKind;
  circuits: string;
  shots: string;
  readoutError: string;
  wanted: string;
}

/** A plan that can be forecast and drawn. */
export interface Plan {
  device: string;
  gateClass: string;
  register: string[];
  kind: SheetKind;
  circuits: number;
  shots: number;
  readoutError: number;
  /** Half-width wanted of retained signal at depth 16; null = none named. */
  wanted: number | null;
}

/** Digits as people type them: spaces of any kind between thousands are dropped. */
const bare = (text: string): string => text.replace(/[\s\u00a0\u2009\u202f]/g, '');

/** A whole number from the class's floor to the most a sheet may have; every fault names the value. */
const wholeNumber = (noun: string, floor: number, most: number) =>
  z.string().transform((text, context) => {
    const digits = bare(text);
    const fault = (message: string) => { context.addIssue({ code: 'custom', message }); return z.NEVER; };
    if (digits === '') return fault(`Give the number of ${noun}.`);
    if (!/^\d+$/.test(digits)) return fault(`Give a whole number of ${noun}; ${text.trim()} is not one.`);
    const value = Number(digits);
    if (value > most) return fault(`${text.trim()} is above the ${noun} a sheet may have, ${most}.`);
    if (value < floor) return fault(belowFloor(value, floor));
    return value;
  });

const decimal = (text: string): number | null => {
  const digits = bare(text);
  return /^(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(digits) ? Number(digits) : null;
};

const readoutError = z.string().transform((text, context) => {
  const value = decimal(text);
  if (value !== null && value < 0.5) return value;
  context.addIssue({ code: 'custom', message: `Give a share from 0 to below 0.5; ${text.trim() || 'nothing'} is not one.` });
  return z.NEVER;
});

const wantedWidth = z.string().transform((text, context) => {
  if (bare(text) === '') return null;
  const value = decimal(text);
  if (value !== null && value > 0 && value < 1) return value;
  context.addIssue({ code: 'custom', message: `Give a half-width between 0 and 1, such as 0.0030; ${text.trim()} is not one.` });
  return z.NEVER;
});

const limits = runSheetCreate.shape;

const register = z.array(z.string().trim().max(40, 'A qubit name has at most 40 characters.')).superRefine((names, context) => {
  names.forEach((name, i) => {
    const fault = (message: string) => context.addIssue({ code: 'custom', path: [i], message });
    if (name === '') fault('Name this qubit as your control software does.');
    else if (names.indexOf(name) < i) fault(`${name} is named twice.`);
  });
});

/** The plan's rules for one gate class, which brings the floors. Each field is judged by itself, so that all faults are told at once. */
export const planSchema = (gateClass: GateClassSummary | undefined) =>
  z.object({
    device: z.string().min(1, 'Choose a device.'),
    gateClass: z.string().refine((id) => id === gateClass?.id, { error: 'Choose a gate class.' }),
    register,
    // Only classes of one qubit offer the choice; a kind chosen for another class is left behind with it.
    kind: z.enum(sheetKinds).transform((kind) => (gateClass?.registerSize === 1 ? kind : 'random')),
    circuits: wholeNumber('circuits', gateClass?.floor.circuits ?? 1, limits.circuits.maxValue ?? 20_000),
    shots: wholeNumber('shots', gateClass?.floor.shots ?? 1, limits.shots.maxValue ?? 10_000_000),
    readoutError,
    wanted: wantedWidth,
  });

export const belowFloor = (value: number, floor: number): string => `${value} is below the floor of ${floor} for this gate class.`;

/** The register cut or filled to the size of the class; names already given are kept. */
export const resizedRegister = (register: readonly string[], size: number): string[] =>
  Array.from({ length: size }, (_, i) => register[i] ?? '');
