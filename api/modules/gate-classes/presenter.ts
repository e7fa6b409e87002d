import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { gateInWords } from '#shared/domain/gate-words.ts';
import type { GateClass } from '#shared/formats/types.ts';

/** The class of that id as lists name it; null for `custom` and for ids the registry does not know. */
export const presentClassRef = (id: string): { id: string; title: string; ranked: boolean } | null => {
  const known = gateClassById(id);
  return known && { id: known.id, title: known.title, ranked: known.ranked };
};

export const presentGateClass = (gateClass: GateClass): GateClassSummary => ({
  id: gateClass.id,
  title: gateClass.title,
  ranked: gateClass.ranked,
  registerSize: gateClass.registerSize,
  kind: gateClass.kind,
  expectedRank: gateClass.expectedRank,
  gates: gateClass.gates.map(({ label, ideal, targets }) => ({ label, words: gateInWords(ideal), targets: [...targets] })),
  lengths: [...gateClass.lengths],
  floor: { ...gateClass.floor },
  href: `/schema/gate-class/${gateClass.id}.json`,
});
