import { cellId, type Cell } from '#tests/studies/coverage/cells.ts';

export interface Task {
  cell: Cell;
  chunk: number;
}

/** The next chunk of the cell that is furthest behind its aim, so that all cells always have the same share of theirs; null = all done. */
export function nextTask(cells: readonly Cell[], taken: (cell: string, chunk: number) => boolean): Task | null {
  let best: Task | null = null;
  let least = 1;
  for (const cell of cells) {
    const chunks = Math.ceil(cell.trials / cell.chunk);
    let chunk = 0;
    while (chunk < chunks && taken(cellId(cell), chunk)) chunk++;
    if (chunk / chunks >= least) continue;
    least = chunk / chunks;
    best = { cell, chunk };
  }
  return best;
}

/** The next chunk of the first step that is not finished. */
export function nextOfSteps(steps: readonly (readonly Cell[])[], taken: (cell: string, chunk: number) => boolean): Task | null {
  for (const step of steps) {
    const task = nextTask(step, taken);
    if (task) return task;
  }
  return null;
}
