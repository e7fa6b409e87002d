import chained2 from '#schema/gate-class/chained-cz-2q/1.json' with { type: 'json' };
import chained3 from '#schema/gate-class/chained-cz-3q/1.json' with { type: 'json' };
import chained4 from '#schema/gate-class/chained-cz-4q/1.json' with { type: 'json' };
import chained5 from '#schema/gate-class/chained-cz-5q/1.json' with { type: 'json' };
import cliffordT from '#schema/gate-class/clifford-t-1q/1.json' with { type: 'json' };
import halfTurn from '#schema/gate-class/half-turn-1q/1.json' with { type: 'json' };
import quarterTurn from '#schema/gate-class/quarter-turn-1q/1.json' with { type: 'json' };
import quarterTurnCz from '#schema/gate-class/quarter-turn-cz-2q/1.json' with { type: 'json' };
import type { GateClass } from '#shared/formats/types.ts';

function deepFreeze<T>(value: T): T {
  if (typeof value === 'object' && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(deepFreeze);
  }
  return value;
}

/** The shipped gate classes in the order in which boards are listed. Frozen: a class never changes, a change is a new version. */
export const gateClasses: readonly GateClass[] = deepFreeze([
  quarterTurn, cliffordT, halfTurn, quarterTurnCz, chained2, chained3, chained4, chained5,
] as GateClass[]);

const byId: ReadonlyMap<string, GateClass> = new Map(gateClasses.map((gateClass) => [gateClass.id, gateClass]));

/** The shipped class of that id ("quarter-turn-1q/1"), or null for `custom` and unknown ids. */
export function gateClassById(id: string): GateClass | null {
  return byId.get(id) ?? null;
}
