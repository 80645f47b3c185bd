import type { RecordTable } from '../../regression/records';
import { convertUnit, setMissing } from './cell-steps';
import { derive, rename, setAside, setKind, setUnit } from './column-steps';
import { FormulaError } from './formula-tokens';
import { joinRareLevels, mapLevels } from './level-steps';
import { dropRepeatedRows, dropRows } from './row-steps';
import { Refusal, type Change, type Effect, type MendStep } from './step-change';

/** A step that cannot be done on the table as it then stands. */
export class StepProblem extends Error {
  constructor(
    readonly step: number,
    message: string,
  ) {
    super(message);
    this.name = 'StepProblem';
  }
}

export interface MendedTable {
  readonly table: RecordTable;
  /** One for each step, in order. */
  readonly effects: readonly Effect[];
}

function apply(table: RecordTable, step: MendStep): Change {
  switch (step.kind) {
    case 'rename':
      return rename(table, step);
    case 'set-unit':
      return setUnit(table, step);
    case 'set-kind':
      return setKind(table, step);
    case 'set-aside':
      return setAside(table, step);
    case 'convert-unit':
      return convertUnit(table, step);
    case 'map-levels':
      return mapLevels(table, step);
    case 'set-missing':
      return setMissing(table, step);
    case 'drop-rows':
      return dropRows(table, step);
    case 'drop-repeated-rows':
      return dropRepeatedRows(table);
    case 'join-rare-levels':
      return joinRareLevels(table, step);
    case 'derive':
      return derive(table, step);
  }
}

/** Applies the steps one after another to a table, which itself stays as it is. Pure but for telling of each step. */
export function applySteps(
  table: RecordTable,
  steps: readonly MendStep[],
  onStepDone: (done: number) => void = () => undefined,
): MendedTable {
  const effects: Effect[] = [];
  let mended = table;
  steps.forEach((step, at) => {
    try {
      const { table: next, told, rowsConcerned } = apply(mended, step);
      mended = next;
      effects.push({ told, rowsConcerned });
    } catch (error) {
      if (error instanceof Refusal || error instanceof FormulaError) throw new StepProblem(at, error.message);
      throw error;
    }
    onStepDone(at + 1);
  });
  return { table: mended, effects };
}
