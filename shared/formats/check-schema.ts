import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';
import { pointerOf } from '#shared/formats/pointer.ts';
import { schemaSentence } from '#shared/formats/schema-sentences.ts';
import { all, first, type Validator } from '#shared/formats/validators.js';

export type FormatName = 'dataset' | 'circuits' | 'runSheet' | 'seal' | 'gateClass' | 'result';

/** Values in a tree up to which every fault is gathered; beyond it only the first, so that faults cannot outgrow the file. */
const gatherUpTo = 20_000;

/** Where a format keeps its long list of like items: `patches[].circuits` or `circuits` at the top. */
type Lists = (value: unknown) => { path: (string | number)[]; items: unknown[] }[];

function member(value: unknown, key: string | number): unknown {
  return typeof value === 'object' && value !== null && Object.hasOwn(value, key) ? (value as Record<string | number, unknown>)[key] : undefined;
}

const circuitsAtTop: Lists = (value) => {
  const items = member(value, 'circuits');
  return Array.isArray(items) ? [{ path: ['circuits'], items }] : [];
};

const circuitsOfPatches: Lists = (value) => {
  const patches = member(value, 'patches');
  if (!Array.isArray(patches)) return [];
  return patches.flatMap((patch, p) => {
    const items = member(patch, 'circuits');
    return Array.isArray(items) ? [{ path: ['patches', p, 'circuits'], items }] : [];
  });
};

const plans: Record<FormatName, { shell: 'datasetShell' | 'circuitsShell' | 'runSheetShell' | 'sealShell' | 'gateClassShell' | 'resultShell'; item?: 'datasetItem' | 'circuitsItem' | 'runSheetItem'; lists?: Lists }> = {
  dataset: { shell: 'datasetShell', item: 'datasetItem', lists: circuitsOfPatches },
  circuits: { shell: 'circuitsShell', item: 'circuitsItem', lists: circuitsAtTop },
  runSheet: { shell: 'runSheetShell', item: 'runSheetItem', lists: circuitsOfPatches },
  seal: { shell: 'sealShell' },
  gateClass: { shell: 'gateClassShell' },
  result: { shell: 'resultShell' },
};

/** Are there more values in the tree than `budget`? Items of the lists in `skip` are not counted. */
function isLarge(value: unknown, skip: ReadonlySet<unknown>, budget: { left: number }): boolean {
  if (--budget.left < 0) return true;
  if (typeof value !== 'object' || value === null || skip.has(value)) return false;
  const children = Array.isArray(value) ? value : Object.values(value);
  return children.length > budget.left || children.some((child) => isLarge(child, skip, budget));
}

function faultsOf(quick: Validator, thorough: Validator, value: unknown, prefix: string, skip: ReadonlySet<unknown>): ErrorDetail[] {
  if (quick(value)) return [];
  let faults = quick.errors ?? [];
  if (!isLarge(value, skip, { left: gatherUpTo })) {
    thorough(value);
    faults = thorough.errors ?? [];
  }
  return faults.map((fault) => schemaSentence(fault, prefix, value)).filter((fault) => fault !== null);
}

/**
 * Checks a value against its JSON Schema; at most 50 faults, none = it fits. Circuits are checked one by one, and
 * the check stops at the fiftieth fault, so a hostile file costs no more than an honest one of its size.
 */
export function checkSchema(format: FormatName, value: unknown): ErrorDetail[] {
  const plan = plans[format];
  const lists = plan.lists?.(value) ?? [];
  const faults = faultsOf(first[plan.shell], all[plan.shell], value, '', new Set(lists.map((list) => list.items)));
  if (plan.item) {
    for (const { path, items } of lists) {
      for (let i = 0; i < items.length && faults.length < limits.errors; i++) {
        if (first[plan.item](items[i])) continue;
        faults.push(...faultsOf(first[plan.item], all[plan.item], items[i], pointerOf(...path, i), new Set()));
      }
    }
  }
  return faults.slice(0, limits.errors);
}
