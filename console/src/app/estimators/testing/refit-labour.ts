/** Invented answers of the service for specs: the refit labour estimator of the Marl Bay Yard Federation. */
import type {
  Edition,
  EditionSummary,
  Estimator,
  Evaluation,
  Fit,
  FitResult,
  FitSummary,
  RecordRevision,
  Specification,
} from '../../api/contract';

export const ines = { id: 'person00ines', name: 'Ines Caldwell' };
export const tomas = { id: 'person0tomas', name: 'Tomas Lindqvist' };

export const revisionReference = {
  id: 'revision0003',
  number: 3,
  ...{ origin: 'file', basedOn: null, originalKept: true, erasedAt: null },
  sha256: 'ab'.repeat(32),
  rowCount: 2391,
  recordSetId: 'recordset001',
  recordSetName: 'Refit jobs',
};

export const specification: Specification = {
  target: { column: 'hours', transform: 'none' },
  inputs: [{ column: 'length' }, { column: 'displacement' }, { column: 'hull' }],
  method: 'ridge',
  penalty: { rule: 'one-standard-error' },
  validation: { scheme: 'grouped', folds: 9, column: 'yard', seed: 1 },
  intervalLevel: 0.9,
};

const lambdas = [100, 10, 1, 0.1, 0.01];
const cvErrors = [2900, 1800, 1500, 1440, 1460];

export const result: FitResult = {
  penalty: {
    lambda: 1,
    lambdaSum: 2391,
    priorSd: 0.79,
    effectiveDegreesOfFreedom: 2.5,
    minimumLambda: 0.1,
    oneStandardErrorLambda: 1,
  },
  intercept: -41.237,
  weights: [
    { input: 'length', level: null, value: 9.731, standardised: 24.1, standardError: 0.82 },
    { input: 'displacement', level: null, value: 11.42, standardised: 33.6, standardError: 0.55 },
    { input: 'hull', level: 'GRP', value: -12.1, standardised: -5.8, standardError: 2.1 },
    { input: 'hull', level: 'steel', value: 18.9, standardised: 7.2, standardError: 2.4 },
  ],
  accuracy: { rmse: 38.73, mae: 27.4, r2: 0.912, standardErrorOfCv: 71, coverage: 0.903 },
  path: lambdas.map((lambda, step) => ({
    lambda,
    effectiveDegreesOfFreedom: 0.8 + step * 0.85,
    cvError: cvErrors[step],
    cvStandardError: 70,
    standardised: [24.1, 33.6, -5.8, 7.2].map((weight) => weight * (0.2 + 0.2 * step)),
  })),
  report: {
    route: 'moments',
    iterations: 0,
    converged: true,
    gap: 0,
    conditionNumber: 18.4,
    warnings: ['hull was held together with rig in 12 records.'],
  },
};

export const fit: Fit = {
  id: 'fit000000007',
  estimator: 'refit-labour',
  estimatorName: 'Refit labour',
  unit: 'h',
  state: 'done',
  progress: { stage: 'diagnostics', done: 1, total: 1 },
  specification,
  revision: revisionReference,
  createdAt: '2026-11-02T09:15:00Z',
  createdBy: ines,
  startedAt: '2026-11-02T09:15:01Z',
  finishedAt: '2026-11-02T09:15:04Z',
  failure: null,
  result,
  editions: [],
};

export const fitSummary: FitSummary = {
  id: fit.id,
  state: 'done',
  method: 'ridge',
  rule: 'one-standard-error',
  inputCount: 3,
  revision: revisionReference,
  createdAt: fit.createdAt,
  createdBy: ines,
  lambda: 1,
  effectiveDegreesOfFreedom: 2.5,
  rmse: 38.73,
  r2: 0.912,
};

export const editionSummary: EditionSummary = {
  id: 'edition00004',
  number: 4,
  estimator: 'refit-labour',
  estimatorName: 'Refit labour',
  unit: 'h',
  state: 'in-force',
  changeNote: 'New records to October.',
  fitId: fit.id,
  method: 'ridge',
  rmse: 38.73,
  recordCount: 2391,
  inputCount: 3,
  createdAt: '2026-11-02T10:00:00Z',
  createdBy: ines,
  submittedAt: '2026-11-02T10:05:00Z',
  submittedBy: ines,
  inForceAt: '2026-11-03T08:30:00Z',
  inForceBy: tomas,
  endedAt: null,
};

export const inputSchema = {
  type: 'object',
  required: ['length', 'displacement', 'hull'],
  properties: {
    length: {
      type: 'number',
      title: 'Length overall',
      'x-unit': 'm',
      'x-range': [6.1, 18.4],
      'x-help': 'Without the bowsprit.',
      'x-order': 1,
      'x-typical': 11.2,
    },
    displacement: {
      type: 'number',
      title: 'Displacement',
      'x-unit': 't',
      'x-range': [1.2, 24],
      'x-order': 2,
      'x-typical': 7.1,
    },
    hull: { type: 'string', title: 'Hull material', enum: ['GRP', 'steel'], 'x-order': 3, 'x-typical': 'GRP' },
  },
};

export const edition: Edition = {
  ...editionSummary,
  checksum: 'cd'.repeat(32),
  inputSchema,
  revision: revisionReference,
  events: [
    { at: '2026-11-02T10:00:00Z', by: ines, state: 'draft', note: 'New records to October.' },
    { at: '2026-11-02T10:05:00Z', by: ines, state: 'under-review', note: '' },
    { at: '2026-11-03T08:30:00Z', by: tomas, state: 'in-force', note: '' },
  ],
  sunsetAt: null,
  scale: 'original',
  intercept: result.intercept,
  weights: result.weights,
  cautions: ['An estimate is not a quotation.'],
  mayPutInForce: false,
};

export const estimator: Estimator = {
  slug: 'refit-labour',
  name: 'Refit labour',
  targetName: 'Labour',
  unit: 'h',
  description: 'Hours of yard labour for a refit.',
  intendedUse: 'Planning a winter booking.',
  notFor: 'Insurance claims.',
  cautions: ['An estimate is not a quotation.'],
  createdAt: '2025-01-10T08:00:00Z',
  createdBy: ines,
  inForce: editionSummary,
  fitCount: 7,
  editionCount: 4,
  estimateCount: 1204,
};

export const evaluation: Evaluation = {
  value: 512.3781,
  unit: 'h',
  interval: { level: 0.9, low: 437.6, high: 588.4 },
  typical: 355.2,
  scale: 'original',
  flags: [{ code: 'outside-range', input: 'displacement', message: 'Displacement 26 t lies above the recorded 24 t.' }],
  contributions: [
    { input: 'length', label: 'Length overall', arm: 0.9, mass: 24.1, contribution: 21.7, float: false },
    { input: 'displacement', label: 'Displacement', arm: 4.2, mass: 33.6, contribution: 141.1, float: false },
    { input: 'hull', label: 'Hull material', arm: -0.6, mass: 9.3, contribution: -5.6, float: false },
  ],
  cautions: ['An estimate is not a quotation.'],
};

const emptyColumn = {
  missingCount: 0,
  distinctCount: 900,
  minimum: 1,
  maximum: 9,
  mean: 4,
  standardDeviation: 2,
  quantiles: null,
  outlying: null,
  histogram: null,
  levels: [],
  unit: null,
};

export const revision: RecordRevision = {
  id: 'revision0003',
  number: 3,
  ...{ origin: 'file', basedOn: null, originalKept: true, erasedAt: null },
  sha256: 'ab'.repeat(32),
  rowCount: 2391,
  columnCount: 6,
  byteCount: 190000,
  fileName: 'refit-jobs.csv',
  createdAt: '2026-11-01T12:00:00Z',
  createdBy: ines,
  recordSetId: 'recordset001',
  recordSetName: 'Refit jobs',
  reading: {
    ...{ encoding: 'utf-8', delimiter: ',', decimal: '.', header: true, sheet: null, headerLine: 1 },
    ...{ missingMarks: [], setAside: [], unreadable: [], choices: {} },
  },
  columns: [
    { ...emptyColumn, name: 'hours', position: 0, kind: 'numeric', unit: 'h' },
    { ...emptyColumn, name: 'length', position: 1, kind: 'numeric', unit: 'm' },
    { ...emptyColumn, name: 'displacement', position: 2, kind: 'numeric', unit: 't', missingCount: 31 },
    {
      ...emptyColumn,
      name: 'hull',
      position: 3,
      kind: 'category',
      minimum: null,
      maximum: null,
      mean: null,
      standardDeviation: null,
      distinctCount: 2,
      levels: [
        { value: 'GRP', count: 2000 },
        { value: 'steel', count: 391 },
      ],
    },
    {
      ...emptyColumn,
      name: 'yard',
      position: 4,
      kind: 'category',
      minimum: null,
      maximum: null,
      mean: null,
      standardDeviation: null,
      distinctCount: 9,
      levels: [{ value: 'Northquay', count: 400 }],
    },
    { ...emptyColumn, name: 'booked', position: 5, kind: 'date' },
    {
      ...emptyColumn,
      name: 'remarks',
      position: 6,
      kind: 'text',
      minimum: null,
      maximum: null,
      mean: null,
      standardDeviation: null,
    },
  ],
};
