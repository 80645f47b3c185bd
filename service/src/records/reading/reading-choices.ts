import type { components } from '../../../../openapi/types/desk';

type Schemas = components['schemas'];

/** How to read a file; what is absent is found out from it. */
export type ReadingChoices = Schemas['ReadingChoices'];
export type ColumnChoice = Schemas['ColumnChoice'];
export type DateOrder = Schemas['DateOrder'];

/** A column of the revision that a file is appended to: its kind and unit hold. */
export interface BaseColumn {
  readonly name: string;
  readonly kind: Schemas['ColumnKind'];
  readonly unit: string | null;
}

/** How far a reading has come: bytes of the file as it lies on disk, or columns measured. */
export interface ReadingProgress {
  readonly stage: 'reading' | 'measuring';
  readonly done: number;
  readonly total: number;
}
