/**
 * Diagnostics that the engine adds to a result beyond the contract's first fields. Each is shown only when it is there
 * and has the shape that is expected; anything else is passed over.
 */
export interface Diagnostics {
  /** What each rule would have chosen. */
  readonly choices: readonly { readonly rule: string; readonly lambda: number }[];
  readonly coverage: readonly CoverageQuarter[];
  readonly inflation: readonly { readonly name: string; readonly factor: number | null }[];
  readonly conditionIndices: readonly (number | null)[];
  readonly sharedLoad: readonly SharedLoad[];
  readonly influential: readonly InfluentialRecord[];
  readonly frequencies: readonly { readonly name: string; readonly frequency: number }[];
  readonly learning: readonly { readonly records: number; readonly rmse: number }[];
  readonly heldOut: readonly HeldOutRecord[];
}

export interface CoverageQuarter {
  readonly from: number;
  readonly to: number;
  readonly records: number;
  readonly coverage: number;
}

/** Inputs that carry the same information, and how each method splits the load among them. */
export interface SharedLoad {
  readonly members: readonly string[];
  readonly smallestCorrelation: number | null;
  readonly splits: readonly { readonly method: string; readonly weights: readonly number[] }[];
}

export interface InfluentialRecord {
  readonly row: number;
  readonly cooksDistance: number;
  readonly leverage: number;
  readonly residual: number;
}

/** One record with the estimate of the fold that had not seen it; both in target units. */
export interface HeldOutRecord {
  readonly row: number;
  readonly recorded: number;
  readonly estimate: number;
}

type Plain = Readonly<Record<string, unknown>>;

/** Whether there is anything to set out in tables; held-out records and rules have places of their own. */
export function hasTables({ heldOut: _, choices: __, ...tables }: Diagnostics): boolean {
  return Object.values(tables).some((table: readonly unknown[]) => table.length > 0);
}

export function diagnosticsOf(result: object): Diagnostics {
  const whole = asPlain(result);
  const more = asPlain(whole['diagnostics']);
  return {
    choices: rows(asPlain(whole['penalty'])['choices']).flatMap(choiceOf),
    coverage: numberRows(asPlain(whole['accuracy'])['coverageByQuarter'], ['from', 'to', 'records', 'coverage']),
    inflation: rows(more['varianceInflation']).map((row) => ({
      name: memberName(row),
      factor: numberOrNull(row['factor']),
    })),
    conditionIndices: rows(more['conditionIndices']).map((row) => numberOrNull(row['index'])),
    sharedLoad: rows(more['sharedLoad']).flatMap(sharedLoadOf),
    influential: numberRows(more['influential'], ['row', 'cooksDistance', 'leverage', 'residual']),
    frequencies: rows(more['selectionFrequency']).flatMap(frequencyOf),
    learning: numberRows(more['learningCurve'], ['records', 'rmse']),
    heldOut: numberRows(more['residuals'], ['row', 'recorded', 'heldOutEstimate']).map(
      ({ row, recorded, heldOutEstimate }) => ({
        row,
        recorded,
        estimate: heldOutEstimate,
      }),
    ),
  };
}

function sharedLoadOf(row: Plain): readonly SharedLoad[] {
  const members = rows(row['members']).map(memberName);
  if (members.length < 2) return [];
  const splits = [
    { method: 'Least squares', weights: numbers(row['leastSquares']) },
    { method: 'Ridge', weights: numbers(row['ridge']) },
    { method: 'Lasso', weights: numbers(row['lasso']) },
  ].filter(({ weights }) => weights.length === members.length);
  return [{ members, smallestCorrelation: numberOrNull(row['smallestCorrelation']), splits }];
}

function choiceOf({ rule, lambda }: Plain): readonly { readonly rule: string; readonly lambda: number }[] {
  return typeof rule === 'string' && typeof lambda === 'number' ? [{ rule, lambda }] : [];
}

function frequencyOf(row: Plain): readonly { readonly name: string; readonly frequency: number }[] {
  const frequency = numberOrNull(row['frequency']);
  return frequency === null ? [] : [{ name: memberName(row), frequency }];
}

/** Rows in which every named field is a number. */
function numberRows<Name extends string>(
  value: unknown,
  names: readonly Name[],
): readonly Readonly<Record<Name, number>>[] {
  return rows(value)
    .filter((row) => names.every((name) => numberOrNull(row[name]) !== null))
    .map((row) => Object.fromEntries(names.map((name) => [name, row[name]])) as Record<Name, number>);
}

function memberName(row: Plain): string {
  const input = typeof row['input'] === 'string' ? row['input'] : '';
  return typeof row['level'] === 'string' ? `${input}: ${row['level']}` : input;
}

function numbers(value: unknown): readonly number[] {
  return Array.isArray(value) ? value.filter((item): item is number => numberOrNull(item) !== null) : [];
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
