import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateClass, RunSheet, SheetCircuit } from '#shared/formats/types.ts';
import type { FactorStore } from '#shared/method/factors.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { sheetStream } from '#shared/runsheet/draw-circuits.ts';
import { canBeSound, drawPatch, isSound, unsealed } from '#shared/runsheet/draw-patch.ts';
import { commitmentOf } from '#shared/runsheet/seal.ts';
import { patchPlans, type PatchPlan } from '#shared/runsheet/sheet-plan.ts';

export interface DrawRequest {
  gateClass: GateClass;
  /** Names of the qubits. */
  register: string[];
  /** N, circuits to estimate from; chained: of each pair patch. */
  circuits: number;
  shots: number;
  /** 1 to 32 bytes, lower-case hex. */
  seed: string;
  /** How circuits are drawn; random unless told. */
  kind?: SheetKind;
  /** Number and device of the sheet; null = an offline sheet. */
  issued: { id: string; device: { provider: string; name: string }; drawnAt: string } | null;
  /** Gives 32 fresh random bytes for each draw; null = nothing is sealed. Independent of the seed. */
  newSecret: (() => Uint8Array) | null;
  /** Where the factors of the sheet's designs are kept for its first estimate. */
  factors?: FactorStore | null;
  onProgress?: (progress: DrawProgress) => void;
}

export interface DrawProgress {
  /** Draws of the sheet so far, and the N that is being tried. */
  draws: number;
  circuits: number;
  /** Share of the draws at this N. */
  fraction: number;
}

export interface DrawnSheet {
  sheet: RunSheet;
  /** The secret of the seal; keep it apart from the sheet. */
  secret: Uint8Array | null;
  /** N of the sheet: as asked, or the first larger one that was sound. */
  circuits: number;
  draws: number;
  /** What the unsealed circuits of each estimating patch determine. */
  designs: { qubits: number[]; rank: number; conditionRatio: number }[];
}

/** Draws at the N that was asked for, and at each larger one. */
const drawsAsked = 200;
const drawsRaised = 20;
/** Raised Ns that are tried before giving up: by tenths, up to five times what was asked. */
const raises = 40;

interface Draw {
  plans: PatchPlan[];
  circuits: SheetCircuit[][];
  secret: Uint8Array | null;
}

/** One draw of the whole sheet under a new secret; null where a patch is not sound by its unsealed circuits. */
function drawOnce({ gateClass, newSecret }: DrawRequest, plans: PatchPlan[], generator: Xoshiro256): Draw | null {
  const secret = newSecret ? newSecret() : null;
  const width = Math.max(4, String(plans.reduce((sum, plan) => sum + plan.estimated + plan.sealed, 0)).length);
  const circuits: SheetCircuit[][] = [];
  let first = 1;
  for (const plan of plans) {
    const drawn = drawPatch(generator, plan, first, width);
    if (!isSound(plan, gateClass.gates, unsealed(plan, drawn, secret))) return null;
    circuits.push(drawn);
    first += drawn.length;
  }
  return { plans, circuits, secret };
}

function sheetOf({ gateClass, register, shots, seed, issued }: DrawRequest, { plans, circuits, secret }: Draw): RunSheet {
  return {
    format: 'evenbeam.run-sheet', formatVersion: '1.0.0', id: issued?.id ?? null, gateClass: gateClass.id, device: issued?.device ?? null,
    register, gates: structuredClone(gateClass.gates), shots, seed, sealSha256: secret ? commitmentOf(secret) : null,
    patches: plans.map(({ qubits, sealed }, p) => ({ qubits, sealed, circuits: circuits[p] ?? [] })), drawnAt: issued?.drawnAt ?? null,
  };
}

function designsOf({ gateClass, factors = null }: DrawRequest, { plans, circuits, secret }: Draw): DrawnSheet['designs'] {
  return plans.flatMap((plan, p) => {
    if (plan.judged === null) return [];
    const { rank, conditionRatio } = judgeDesign({ gates: gateClass.gates, qubits: plan.qubits, circuits: unsealed(plan, circuits[p] ?? [], secret), pairOfChain: plan.judged === 'pair-of-chain' }, factors);
    return [{ qubits: plan.qubits, rank, conditionRatio }];
  });
}

/**
 * Draws a run sheet: circuits from the seed's stream until those that are not sealed are sound by themselves. After 200
 * draws N is raised by tenths, 20 draws each, and the first N that was sound is taken.
 * @throws AppError `design-unsound` when none up to five times N is
 * Cost: one qubit, milliseconds a draw; a pair, about half a second.
 */
export function drawSheet(request: DrawRequest): DrawnSheet {
  const { gateClass, circuits: asked } = request;
  if (request.register.length !== gateClass.registerSize) throw new AppError('invalid-request', `The gate class "${gateClass.id}" is for a register of ${gateClass.registerSize}; ${request.register.length} names are given.`);
  const generator = sheetStream(request.seed);
  let draws = 0;
  let tried = 0;
  let circuits = asked;
  for (let raised = 0; tried <= raises; raised++) {
    circuits = Math.ceil((asked * (10 + raised)) / 10);
    const plans = patchPlans(gateClass, circuits, request.newSecret !== null, request.kind);
    // Draws that cannot be sound are made all the same, so that a seed gives the sheet it always gave, but not judged.
    if (plans.every(canBeSound)) tried++;
    const most = raised === 0 ? drawsAsked : drawsRaised;
    for (let i = 0; i < most; i++) {
      request.onProgress?.({ draws, circuits, fraction: i / most });
      draws++;
      const draw = drawOnce(request, plans, generator);
      if (draw) return { sheet: sheetOf(request, draw), secret: draw.secret, circuits, draws, designs: designsOf(request, draw) };
    }
  }
  throw new AppError('design-unsound', `No sound sheet was found for "${gateClass.id}" with ${asked} circuits to estimate from, nor with more, up to ${circuits}.`);
}
