import { formatCount, formatSigned, narrowSpace, plural, countInWords, capitalise } from '#shared/domain/format.ts';
import { linearAxis, placedAxis, upright, type Axis } from './axis.ts';
import { cell, type ChartTable } from './chart-table.ts';

export interface DriftBlock {
  block: number;
  /** Misfit of the block in standard deviations of its expected value. */
  sigmas: number;
  circuits: number;
}

/** Central 99 % range of a misfit, in standard deviations: the range the check itself uses. */
export const expectedRange = 2.58;

export interface DriftDrawing {
  points: readonly { block: number; sigmas: number; outside: boolean; label: string }[];
  x: Axis;
  y: Axis;
  table: ChartTable;
  says: string;
}

/** Misfit of each block in order of time, against the range that chance alone fills in 99 of 100 blocks. */
export function driftDrawing(blocks: readonly DriftBlock[]): DriftDrawing {
  const points = blocks.map(({ block, sigmas, circuits }) => {
    const outside = Math.abs(sigmas) > expectedRange;
    return { block, sigmas, outside, label: `Block ${block}: ${formatSigned(sigmas, 2)} standard deviations, ${formatCount(circuits)} circuits${outside ? ', outside the expected range' : ''}` };
  });
  const outside = points.filter((p) => p.outside).length;
  const found = outside === 0 ? 'None lies outside it here.' : `${capitalise(countInWords(outside))} ${plural(outside, 'lies', 'lie')} outside it here.`;
  return {
    points,
    x: placedAxis(blocks.map((b) => b.block), (block) => blocks.findIndex((b) => b.block === block), String, 6),
    y: upright(linearAxis(blocks.map((b) => b.sigmas), { include: [-4, 4], pad: 0, count: 4, signed: true, nice: true })),
    table: {
      caption: 'Misfit of each block, in order of time',
      columns: [{ head: 'Block', csv: 'block', numeric: true }, { head: 'Misfit, σ', csv: 'misfit_sigmas', numeric: true }, { head: 'Circuits', csv: 'circuits', numeric: true }],
      rows: blocks.map((b) => [cell(String(b.block), b.block), cell(formatSigned(b.sigmas, 2), b.sigmas), cell(formatCount(b.circuits), b.circuits)]),
    },
    says: `Each point sums the squared residuals of one block. By chance alone about one block in a hundred falls outside the grey range, ±${expectedRange}${narrowSpace}σ. ${found} This does not rule out drift inside a block.`,
  };
}
