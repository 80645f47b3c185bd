import type { FitNew, RecordRevision, Specification, SpecificationInput } from '../../api/contract';
import { typedNumber } from '../words/typed-number';
import { rulesFor } from '../words/method-words';
import { type FitDraft, type InputDraft, extrasOffered, usedInputs } from './fit-draft';
import { readRowFilter } from './read-row-filter';

/** Complaints under the path that the service would give them, such as `specification/validation/folds`. */
export type DraftProblems = ReadonlyMap<string, string>;

export type DraftReading = { readonly fit: FitNew } | { readonly problems: DraftProblems };

/** Where a typed number must lie. */
interface Bounds {
  readonly words: string;
  readonly holds: (value: number) => boolean;
}

const positive: Bounds = { words: 'a number above 0', holds: (value) => value > 0 };
const notNegative: Bounds = { words: 'a number of 0 or more', holds: (value) => value >= 0 };
const between0and1: Bounds = { words: 'a number between 0 and 1', holds: (value) => value > 0 && value < 1 };
const foldNumber: Bounds = {
  words: 'a whole number from 2 to 100',
  holds: (value) => Number.isInteger(value) && value >= 2 && value <= 100,
};
const seedNumber: Bounds = {
  words: 'a whole number from 0 to 4294967295',
  holds: (value) => Number.isInteger(value) && value >= 0 && value <= 4294967295,
};
const levelNumber: Bounds = {
  words: 'a percentage above 50 and below 100',
  holds: (value) => value > 50 && value < 100,
};

/** Turns what was typed into a request, or says beside which fields it cannot. */
export function readDraft(draft: FitDraft, revision?: RecordRevision): DraftReading {
  const problems = new Map<string, string>();
  const number = (field: string, text: string, bounds: Bounds): number => {
    const reading = typedNumber(text);
    if ('value' in reading && bounds.holds(reading.value)) return reading.value;
    problems.set(field, 'problem' in reading ? reading.problem : `Enter ${bounds.words}.`);
    return Number.NaN;
  };
  if (draft.revisionId === '') problems.set('revisionId', 'Choose the records to fit.');
  if (draft.target === '') problems.set('specification/target/column', 'Choose what to estimate.');
  const used = usedInputs(draft);
  if (used.length === 0) problems.set('specification/inputs', 'Use at least one input.');
  const specification: Specification = {
    target: { column: draft.target, transform: draft.targetTransform },
    inputs: used.map((input, position) =>
      inputOf(input, number(`specification/inputs/${position}/penaltyFactor`, input.penaltyFactor, notNegative)),
    ),
    ...rowFilterOf(draft, revision, problems),
    weightColumn: draft.weightColumn || null,
    method: draft.method,
    ...(draft.method === 'elastic-net' ? { mixing: number('specification/mixing', draft.mixing, between0and1) } : {}),
    ...penaltyOf(draft, number),
    validation: validationOf(draft, number, problems),
    ...extrasOf(draft),
    intervalLevel: number('specification/intervalLevel', draft.level, levelNumber) / 100,
  };
  return problems.size > 0 ? { problems } : { fit: { revisionId: draft.revisionId, specification } };
}

function rowFilterOf(
  draft: FitDraft,
  revision: RecordRevision | undefined,
  problems: Map<string, string>,
): Pick<Specification, 'rowFilter'> {
  if (!revision) return {};
  const reading = readRowFilter(draft, revision);
  for (const [part, words] of Object.entries(reading.problems)) problems.set(`specification/rowFilter/${part}`, words);
  return reading.filter ? { rowFilter: reading.filter } : {};
}

/** Half samples that show how steadily an input is chosen: the usual hundred (Meinshausen and Bühlmann 2010). */
const selectionSamples = 100;

function extrasOf(draft: FitDraft): Pick<Specification, 'extras'> {
  const offered = extrasOffered(draft);
  const extras = {
    ...(offered.nestedFolds && draft.nestedFolds ? { nestedFolds: true } : {}),
    ...(offered.selectionFrequency && draft.selectionFrequency ? { selectionSamples } : {}),
    ...(draft.learningCurve ? { learningCurve: true } : {}),
  };
  return Object.keys(extras).length > 0 ? { extras } : {};
}

type NumberReader = (field: string, text: string, bounds: Bounds) => number;

/** Sends only what differs from the contract's defaults, so that the specification reads short. */
function inputOf(input: InputDraft, penaltyFactor: number): SpecificationInput {
  return {
    column: input.column,
    ...(input.label.trim() ? { label: input.label.trim() } : {}),
    ...(input.help.trim() ? { help: input.help.trim() } : {}),
    ...(input.kind === 'own' ? {} : { kind: input.kind }),
    transform: input.transform,
    missing: input.missing,
    unseen: input.unseen,
    penaltyFactor,
    sign: input.sign,
  };
}

/** The rule that will be sent: one left over from another method gives way to the least held-out error. */
export function ruleInEffect(draft: FitDraft): FitDraft['rule'] {
  return rulesFor(draft.method).some((choice) => choice.value === draft.rule) ? draft.rule : 'minimum';
}

function penaltyOf(draft: FitDraft, number: NumberReader): Pick<Specification, 'penalty'> {
  if (draft.method === 'least-squares') return {};
  const rule = ruleInEffect(draft);
  if (rule === 'fixed')
    return { penalty: { rule, value: number('specification/penalty/value', draft.penaltyValue, notNegative) } };
  if (rule === 'prior')
    return { penalty: { rule, value: number('specification/penalty/value', draft.penaltyValue, positive) } };
  return { penalty: { rule } };
}

function validationOf(
  draft: FitDraft,
  number: NumberReader,
  problems: Map<string, string>,
): NonNullable<Specification['validation']> {
  const folds = number('specification/validation/folds', draft.folds, foldNumber);
  if (draft.scheme === 'forward') {
    if (draft.timeColumn === '') problems.set('specification/validation/column', 'Choose the column that says when.');
    const gap = number('specification/validation/gap', draft.gap, notNegative);
    return { scheme: 'forward', folds, column: draft.timeColumn, gap };
  }
  const seed = number('specification/validation/seed', draft.seed, seedNumber);
  if (draft.scheme === 'k-fold') return { scheme: 'k-fold', folds, seed };
  if (draft.groupColumn === '')
    problems.set('specification/validation/column', 'Choose the column that names the groups.');
  return { scheme: 'grouped', folds, column: draft.groupColumn, seed };
}

/**
 * Complaints about inputs come by position among those that were sent. Positions shift as soon as one is ticked, so they
 * are kept under `input:` and the column's name.
 */
export function problemsByInput(problems: DraftProblems, draft: FitDraft): DraftProblems {
  const sent = usedInputs(draft);
  const named = new Map<string, string>();
  for (const [path, words] of problems) {
    const position = /^specification\/inputs\/(\d+)(\/|$)/.exec(path)?.[1];
    const column = position === undefined ? undefined : sent[Number(position)]?.column;
    const key = column === undefined ? path : `input:${column}`;
    const before = named.get(key);
    named.set(key, before === undefined ? words : `${before} ${words}`);
  }
  return named;
}
