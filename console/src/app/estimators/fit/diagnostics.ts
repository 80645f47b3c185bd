/**
 * Diagnostics that the engine adds to a result beyond the contract's first fields. Each is shown only when it is there
 * and has the shape that is expected; anything else is passed over.
 */
export interface Diagnostics {
  readonly coverage: readonly CoverageQuarter[];
  readonly inflation: readonly { readonly name: string; readonly factor: number | null }[];
  readonly conditionIndices: readonly (number | null)[];
  readonly sharedLoad: readonly SharedLoad[];
  readonly influential: readonly InfluentialRecord[];
}

export interface CoverageQuarter {
  readonly from: number;
  readonly to: number;
  readonly records: number;
  readonly coverage: number;
}

export interface SharedLoad {
  readonly members: readonly string[];
  readonly smallestCorrelation: number | null;
}

export interface InfluentialRecord {
  readonly row: number;
  readonly cooksDistance: number;
  readonly leverage: number;
  readonly residual: number;
}

export function hasDiagnostics(diagnostics: Diagnostics): boolean {
  return Object.values(diagnostics).some((rows: readonly unknown[]) => rows.length > 0);
}

type Plain = Readonly<Record<string, unknown>>;

export function diagnosticsOf(result: object): Diagnostics {
  const whole = asPlain(result);
  const more = asPlain(whole['diagnostics']);
  return {
    coverage: rows(asPlain(whole['accuracy'])['coverageByQuarter']).flatMap(quarterOf),
    inflation: rows(more['varianceInflation']).map((row) => ({ name: memberName(row), factor: numberOrNull(row['factor']) })),
    conditionIndices: rows(more['conditionIndices']).map((row) => numberOrNull(row['index'])),
    sharedLoad: rows(more['sharedLoad']).flatMap(sharedLoadOf),
    influential: rows(more['influential']).flatMap(influentialOf),
  };
}

function quarterOf(row: Plain): readonly CoverageQuarter[] {
  const [from, to, records, coverage] = ['from', 'to', 'records', 'coverage'].map((name) => numberOrNull(row[name]));
  if (from === null || to === null || records === null || coverage === null) return [];
  return [{ from, to, records, coverage }];
}

function sharedLoadOf(row: Plain): readonly SharedLoad[] {
  const members = rows(row['members']).map(memberName);
  return members.length < 2 ? [] : [{ members, smallestCorrelation: numberOrNull(row['smallestCorrelation']) }];
}

function influentialOf(row: Plain): readonly InfluentialRecord[] {
  const [at, cooksDistance, leverage, residual] = ['row', 'cooksDistance', 'leverage', 'residual'].map((name) => numberOrNull(row[name]));
  if (at === null || cooksDistance === null || leverage === null || residual === null) return [];
  return [{ row: at, cooksDistance, leverage, residual }];
}

function memberName(row: Plain): string {
  const input = typeof row['input'] === 'string' ? row['input'] : '';
  return typeof row['level'] === 'string' ? `${input}: ${row['level']}` : input;
}

function rows(value: unknown): readonly Plain[] {
  return Array.isArray(value) ? value.map(asPlain) : [];
}

function asPlain(value: unknown): Plain {
  return typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Plain) : {};
}

function numberOrNull(value: unknown): number | null {
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}
