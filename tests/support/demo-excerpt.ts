import { stories } from '#api/demo/plan/index.ts';

const keys = [
  'meadow-5-quarter-turn-1q-1-2024-12-02', 'weir-11-quarter-turn-1q-1-2025-06-16', 'marl-4-quarter-turn-1q-1-2026-03-09', 'sedge-3-quarter-turn-1q-1-2026-03-23',
  'marl-4-quarter-turn-1q-1-2026-05-04', 'pebble-2-quarter-turn-1q-1-2026-07-06', 'thistle-6-quarter-turn-1q-1-2026-10-19', 'tarn-1-clifford-t-1q-1-2026-10-26',
  'lantern-2-quarter-turn-1q-1-2026-11-02', 'plumbline-1-quarter-turn-1q-1-2026-11-03', 'tarn-1-quarter-turn-1q-1-2026-11-18', 'copse-9-quarter-turn-1q-1-2026-11-23',
];

/** Stories of the demo in which every state occurs in which a submission can rest; a few seconds to make. */
export const demoExcerpt = stories.filter(({ key }) => keys.includes(key));
