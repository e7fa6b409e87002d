/** Rank study: `npm run study:ranks` simulates the boards of every scenario and writes shared/studies/ranks.json. About three minutes of one core. */
import { writeFileSync } from 'node:fs';
import { setPriority } from 'node:os';
import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { DEFAULT_REPLICATES, METHOD } from '#shared/method/constants.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import type { RankStudy } from '#shared/studies/rank-study.ts';
import { runBoard } from '#tests/studies/ranks/board.ts';
import { scenarios, type Scenario } from '#tests/studies/ranks/scenarios.ts';

const BOARDS = 2000;
const LEVEL = 0.95;
const SEED_RULE = 'xoshiro256** from SHA-256 of the UTF-8 text "rank study 1: <scenario>", board after board';
const OUT = 'shared/studies/ranks.json';

function runScenario(scenario: Scenario): RankStudy['scenarios'][number] {
  const generator = new Xoshiro256(sha256(utf8ToBytes(`rank study 1: ${scenario.id}`)));
  let [covered, naive, width] = [0, 0, 0];
  for (let b = 0; b < BOARDS; b++) {
    const board = runBoard(scenario, DEFAULT_REPLICATES, LEVEL, generator);
    if (board.covered) covered++;
    if (board.naive) naive++;
    width += board.width / BOARDS;
  }
  console.log(`${scenario.title}: ${covered} of ${BOARDS} covered, percentile interval of the rank ${naive}, mean width ${width.toFixed(2)}`);
  return { id: scenario.id, title: scenario.title, offsets: [...scenario.offsets], shots: [...scenario.shots], boards: BOARDS, covered, naiveCovered: naive, meanWidth: Number(width.toFixed(3)) };
}

setPriority(15);
const study: RankStudy = {
  format: 'evenbeam.study.ranks', method: METHOD, date: new Date().toISOString().slice(0, 10), command: 'npm run study:ranks', seedRule: SEED_RULE,
  level: LEVEL, replicates: DEFAULT_REPLICATES,
  notes: [
    'Every device is measured on twenty circuits with two outcomes; its figure is the retained signal, and its replicates are drawn from smoothed frequencies as the method draws them.',
    'Covered: for all devices at once, the range holds every rank that the device may truly claim; equal devices may claim each other’s.',
    'The percentile interval of the bootstrap rank is given for comparison only, and is asked for less: of equal devices it has to hold one rank, in an order fixed beforehand.',
  ],
  scenarios: scenarios.map(runScenario),
};
writeFileSync(OUT, `${JSON.stringify(study, null, 2)}\n`);
console.log(`→ ${OUT}`);
