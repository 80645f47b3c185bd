import type { CellValue } from '../revision-rows';
import type { KeyProblem, TableComparison } from './comparison/compare-tables';
import type { CorrelationMap } from './correlation-map';
import type { Matching } from './matching-rows';
import type { ScatterPoints } from './scatter-sample';

/** What the looking thread can be asked, and what it answers. */
export interface LookTasks {
  readonly 'matching-rows': {
    readonly asked: { readonly revisionId: string; readonly where: string };
    readonly answer: Matching;
  };
  readonly 'rows-at': {
    /** Positions from 0, rising. */
    readonly asked: { readonly revisionId: string; readonly positions: Uint32Array };
    readonly answer: readonly (readonly CellValue[])[];
  };
  readonly correlations: {
    readonly asked: { readonly revisionId: string; readonly columns: readonly string[] };
    readonly answer: CorrelationMap;
  };
  readonly scatter: {
    readonly asked: { readonly revisionId: string; readonly x: string; readonly y: string };
    readonly answer: ScatterPoints;
  };
  readonly comparison: {
    /** Key: null finds one, empty goes by order. */
    readonly asked: {
      readonly fromId: string;
      readonly toId: string;
      readonly key: string | null;
      /** Columns of `from` that `to` calls otherwise. */
      readonly renames: ReadonlyMap<string, string>;
    };
    readonly answer: TableComparison | KeyProblem;
  };
}

export type LookKind = keyof LookTasks;

export type LookTask = {
  readonly [Kind in LookKind]: {
    readonly kind: Kind;
    readonly databasePath: string;
    readonly asked: LookTasks[Kind]['asked'];
  };
}[LookKind];
