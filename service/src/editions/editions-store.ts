import type { components } from '../../../openapi/types/desk';
import type { Database } from '../database/database';
import type { Page } from '../http/page';

export type EditionState = components['schemas']['EditionState'];

export interface PersonName {
  readonly id: string;
  readonly name: string;
}

interface EditionRow {
  id: string;
  estimatorId: string;
  number: number;
  fitId: string;
  state: EditionState;
  changeNote: string;
  /** Canonical JSON, frozen. */
  formula: string;
  checksum: string;
  /** JSON. */
  inputSchema: string;
  /** JSON. */
  cautions: string;
  method: string;
  rmse: number;
  recordCount: number;
  inputCount: number;
  createdAt: string;
  createdBy: string;
  submittedAt: string | null;
  submittedBy: string | null;
  inForceAt: string | null;
  inForceBy: string | null;
  endedAt: string | null;
  sunsetAt: string | null;
}

export type NewEdition = Pick<
  EditionRow,
  | 'id'
  | 'estimatorId'
  | 'number'
  | 'fitId'
  | 'changeNote'
  | 'formula'
  | 'checksum'
  | 'method'
  | 'rmse'
  | 'recordCount'
  | 'inputCount'
  | 'createdAt'
  | 'createdBy'
> & { readonly inputSchema: Readonly<Record<string, unknown>>; readonly cautions: readonly string[] };

type Bare = Omit<EditionRow, 'formula' | 'inputSchema' | 'cautions' | 'createdBy' | 'submittedBy' | 'inForceBy'>;

/** An edition as lists show it: without its formula. */
export interface EditionRecord extends Readonly<Bare> {
  readonly slug: string;
  readonly estimatorName: string;
  readonly unit: string;
  readonly createdBy: PersonName;
  readonly submittedBy: PersonName | null;
  readonly inForceBy: PersonName | null;
}

/** What evaluating needs. */
export interface EditionContent {
  readonly id: string;
  readonly formula: string;
  readonly inputSchema: Readonly<Record<string, unknown>>;
  readonly cautions: readonly string[];
}

export interface EditionEvent {
  readonly at: string;
  readonly by: PersonName;
  readonly state: EditionState;
  readonly note: string;
}

type ListedRow = Bare & {
  slug: string;
  estimatorName: string;
  unit: string;
  createdBy: string;
  createdByName: string;
  submittedBy: string | null;
  submittedByName: string | null;
  inForceBy: string | null;
  inForceByName: string | null;
};

export type EditionMove = Partial<
  Pick<EditionRow, 'submittedAt' | 'submittedBy' | 'inForceAt' | 'inForceBy' | 'endedAt' | 'sunsetAt'>
> & {
  readonly state: EditionState;
};

const listedColumns = [
  'id',
  'estimatorId',
  'number',
  'fitId',
  'state',
  'changeNote',
  'checksum',
  'method',
  'rmse',
  'recordCount',
  'inputCount',
]
  .concat(['createdAt', 'createdBy', 'submittedAt', 'submittedBy', 'inForceAt', 'inForceBy', 'endedAt', 'sunsetAt'])
  .map((column) => `editions.${column}`);

export class EditionsStore {
  constructor(private readonly database: Database) {}

  async insert(edition: NewEdition): Promise<void> {
    const { inputSchema, cautions } = edition;
    const json = { inputSchema: JSON.stringify(inputSchema), cautions: JSON.stringify(cautions) };
    await this.database.table<EditionRow>('editions').insert({ ...edition, ...json, state: 'draft' });
  }

  async lastNumber(estimatorId: string): Promise<number> {
    const row = await this.database.connection('editions').where({ estimatorId }).max({ last: 'number' }).first();
    return Number(row?.['last'] ?? 0);
  }

  async find(id: string): Promise<EditionRecord | null> {
    return this.first(this.listed().where('editions.id', id));
  }

  async findByNumber(estimatorId: string, number: number): Promise<EditionRecord | null> {
    return this.first(this.listed().where({ 'editions.estimatorId': estimatorId, 'editions.number': number }));
  }

  async list(estimatorId: string, { limit, offset }: Page): Promise<EditionRecord[]> {
    const rows = (await this.listed()
      .where({ estimatorId })
      .orderBy('editions.number', 'desc')
      .limit(limit)
      .offset(offset)) as ListedRow[];
    return rows.map(toRecord);
  }

  async count(estimatorId: string): Promise<number> {
    const row = await this.database.connection('editions').where({ estimatorId }).count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  /** Of each of these estimators the edition in force, where there is one. */
  async inForceOf(estimatorIds: readonly string[]): Promise<EditionRecord[]> {
    const rows = (await this.listed()
      .where('editions.state', 'in-force')
      .whereIn('editions.estimatorId', [...estimatorIds])) as ListedRow[];
    return rows.map(toRecord);
  }

  /** Of every estimator, by name. */
  async listInState(state: EditionState): Promise<EditionRecord[]> {
    const rows = (await this.listed()
      .where('editions.state', state)
      .orderBy('estimators.name')
      .orderBy('editions.id')) as ListedRow[];
    return rows.map(toRecord);
  }

  async listOfFit(fitId: string): Promise<{ id: string; number: number; state: EditionState }[]> {
    const rows = await this.database
      .table<EditionRow>('editions')
      .where({ fitId })
      .orderBy('number')
      .select('id', 'number', 'state');
    return rows.map(({ id, number, state }) => ({ id, number, state }));
  }

  async content(id: string): Promise<EditionContent | null> {
    const row = await this.database
      .table<EditionRow>('editions')
      .where({ id })
      .first('id', 'formula', 'inputSchema', 'cautions');
    if (!row) return null;
    return {
      id: row.id,
      formula: row.formula,
      inputSchema: JSON.parse(row.inputSchema) as Record<string, unknown>,
      cautions: JSON.parse(row.cautions) as string[],
    };
  }

  /** False when the edition was no longer in `from`: somebody else was quicker. */
  async move(id: string, from: EditionState, move: EditionMove): Promise<boolean> {
    return (await this.database.table<EditionRow>('editions').where({ id, state: from }).update(move)) === 1;
  }

  async insertEvent(event: {
    readonly editionId: string;
    readonly at: string;
    readonly by: string;
    readonly state: EditionState;
    readonly note: string;
  }): Promise<void> {
    await this.database.table('editionEvents').insert(event);
  }

  async events(editionId: string): Promise<EditionEvent[]> {
    const rows = (await this.database
      .connection('editionEvents')
      .join('people', 'people.id', 'editionEvents.by')
      .where({ editionId })
      .orderBy('editionEvents.id')
      .select(
        'editionEvents.at',
        'editionEvents.by',
        'people.name as byName',
        'editionEvents.state',
        'editionEvents.note',
      )) as {
      at: string;
      by: string;
      byName: string;
      state: EditionState;
      note: string;
    }[];
    return rows.map(({ at, by, byName, state, note }) => ({ at, by: { id: by, name: byName }, state, note }));
  }

  private listed() {
    return this.database
      .connection('editions')
      .join('estimators', 'estimators.id', 'editions.estimatorId')
      .join('people as creators', 'creators.id', 'editions.createdBy')
      .leftJoin('people as submitters', 'submitters.id', 'editions.submittedBy')
      .leftJoin('people as approvers', 'approvers.id', 'editions.inForceBy')
      .select(listedColumns)
      .select('estimators.slug', 'estimators.name as estimatorName', 'estimators.unit')
      .select(
        'creators.name as createdByName',
        'submitters.name as submittedByName',
        'approvers.name as inForceByName',
      );
  }

  private async first(query: ReturnType<EditionsStore['listed']>): Promise<EditionRecord | null> {
    const row = (await query.first()) as ListedRow | undefined;
    return row ? toRecord(row) : null;
  }
}

function toRecord(row: ListedRow): EditionRecord {
  const { createdByName, submittedByName, inForceByName, ...rest } = row;
  return {
    ...rest,
    createdBy: { id: row.createdBy, name: createdByName },
    submittedBy: personName(row.submittedBy, submittedByName),
    inForceBy: personName(row.inForceBy, inForceByName),
  };
}

function personName(id: string | null, name: string | null): PersonName | null {
  return id !== null && name !== null ? { id, name } : null;
}
