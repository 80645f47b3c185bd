import type { IncomingFile, ProposedColumn, ReadingProposal, RecordTask } from '../../../api/contract';

/** A yard's invented export, as the service would propose to read it. For specs. */
export function proposedColumn(name: string, position: number, rest: Partial<ProposedColumn> = {}): ProposedColumn {
  return {
    ...{ name, position, kind: 'numeric', unit: null, dateOrder: null, setAside: false, missingMarks: [] },
    ...{ missingCount: 0, unreadableCount: 0, unreadableRows: [], unitsInCells: [], suspectMarks: [], doubts: [] },
    ...rest,
  };
}

export const PROPOSAL: ReadingProposal = {
  fileKind: 'text',
  sheets: [],
  encoding: 'UTF-8',
  choices: { delimiter: ';', decimal: ',', headerLine: 3, missingMarks: [] },
  columns: [
    proposedColumn('length', 0, {
      unit: 'm',
      unitsInCells: [
        { unit: 'm', count: 297, factor: 1 },
        { unit: 'ft', count: 3, factor: 0.3048 },
      ],
    }),
    proposedColumn('crew', 1, {
      missingCount: 4,
      unreadableCount: 1,
      unreadableRows: [2],
      suspectMarks: [{ mark: '999', count: 6 }],
    }),
    proposedColumn('finished', 2, {
      kind: 'date',
      dateOrder: 'day-first',
      doubts: ['Days and months cannot be told apart in any row.'],
    }),
    proposedColumn('owner', 3, { kind: 'text' }),
  ],
  rowsLookedAt: 300,
  complete: true,
  written: [
    ['12,5 m', '999', '4.3.2026', 'Wren Askerhythe'],
    ['41 ft', 'see plan', '5.3.2026', 'Odo Plimsworth'],
    ['', '4', 'n/a', 'Ysolde Tarnkeep'],
  ],
  read: [
    [12.5, 999, '2026-03-04', 'Wren Askerhythe'],
    [12.4968, null, '2026-03-05', 'Odo Plimsworth'],
    [null, 4, null, 'Ysolde Tarnkeep'],
  ],
  appending: null,
};

export const INCOMING: IncomingFile = {
  id: 'incoming1',
  fileName: 'marl-point_jobs.csv',
  byteCount: 48_200,
  sha256: '5'.repeat(64),
  receivedAt: '2026-12-01T09:00:00Z',
  keptUntil: '2026-12-02T09:00:00Z',
  proposal: PROPOSAL,
};

export const WORKBOOK: ReadingProposal = {
  ...PROPOSAL,
  ...{ fileKind: 'workbook', sheets: ['Jobs', 'Notes'], encoding: '' },
  choices: { sheet: 'Jobs', decimal: '.', headerLine: 1, missingMarks: [] },
};

export function appendingProposal(appending: Partial<NonNullable<ReadingProposal['appending']>>): ReadingProposal {
  const revision = { id: 'revision2', number: 2, recordSetId: 'records1', recordSetName: 'Refits, nine yards' };
  return { ...PROPOSAL, appending: { revision, lacking: [], additional: [], differing: [], ...appending } };
}

export function bringInTask(rest: Partial<RecordTask>): RecordTask {
  return {
    ...{ id: 'task1', kind: 'bring-in', state: 'running', recordSetId: null, revisionId: null, problem: null },
    progress: { stage: 'waiting', done: 0, total: 0 },
    createdAt: '2026-12-01T09:05:00Z',
    createdBy: { id: 'person00ines', name: 'Ines Caldwell' },
    ...rest,
  };
}
