import type { Clock } from '../clock';
import type { CellStorage } from '../records/storing/cell-storage';
import type { Job } from './job';

/** Removes cells that were stored ahead of a revision by a process that was killed before it. */
export function sweepCells(cells: CellStorage, clock: Clock): Job {
  return { name: 'sweep-cells', everyMs: 24 * 60 * 60 * 1000, run: () => cells.sweep(clock.now()) };
}
