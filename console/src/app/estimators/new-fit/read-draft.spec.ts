import { revision } from '../testing/refit-labour';
import { draftOn, emptyDraft, usedInputs, type FitDraft } from './fit-draft';
import { problemsByInput, readDraft, ruleInEffect } from './read-draft';

const ready: FitDraft = { ...draftOn(revision, emptyDraft), target: 'hours' };

function problemsOf(draft: FitDraft): Record<string, string> {
  const reading = readDraft(draft);
  return 'problems' in reading ? Object.fromEntries(reading.problems) : {};
}

describe('a draft of a fit', () => {
  it('needs no more than a target once the records are chosen', () => {
    expect(readDraft(ready)).toEqual({
      fit: {
        revisionId: revision.id,
        specification: {
          target: { column: 'hours', transform: 'none' },
          inputs: ['length', 'displacement', 'hull', 'yard'].map((column) => ({
            column,
            transform: 'none',
            missing: column === 'displacement' ? 'typical' : 'refuse',
            unseen: 'refuse',
            penaltyFactor: 1,
            sign: 'any',
          })),
          weightColumn: null,
          method: 'ridge',
          penalty: { rule: 'minimum' },
          validation: { scheme: 'k-fold', folds: 10, seed: 1 },
          intervalLevel: 0.9,
        },
      },
    });
  });

  it('asks for the longer computations that suit its method, and only those that were ticked', () => {
    const extrasOf = (draft: FitDraft): unknown => {
      const reading = readDraft(draft);
      return 'fit' in reading ? reading.fit.specification.extras : undefined;
    };
    const ticked = { ...ready, nestedFolds: true, selectionFrequency: true, learningCurve: true };
    expect(extrasOf(ready)).toBeUndefined();
    expect(extrasOf(ticked)).toEqual({ nestedFolds: true, learningCurve: true });
    expect(extrasOf({ ...ticked, method: 'lasso', rule: 'fixed', penaltyValue: '1' })).toEqual({
      selectionSamples: 100,
      learningCurve: true,
    });
  });

  it('offers no text as an input, and leaves dates out until they are ticked', () => {
    expect(ready.inputs.map((input) => input.column)).not.toContain('remarks');
    expect(ready.inputs.find((input) => input.column === 'booked')?.used).toBe(false);
  });

  it('never sends the target or the weight as an input', () => {
    expect(usedInputs({ ...ready, weightColumn: 'length' }).map((input) => input.column)).toEqual([
      'displacement',
      'hull',
      'yard',
    ]);
  });

  it('says what is missing, under the path that the service would use', () => {
    expect(problemsOf(emptyDraft)).toEqual({
      revisionId: 'Choose the records to fit.',
      'specification/target/column': 'Choose what to estimate.',
      'specification/inputs': 'Use at least one input.',
    });
  });

  it('says what a number must be', () => {
    expect(problemsOf({ ...ready, folds: '1', seed: 'x', level: '100' })).toEqual({
      'specification/validation/folds': 'Enter a whole number from 2 to 100.',
      'specification/validation/seed': '“x” is not a number. Write it like 12.5.',
      'specification/intervalLevel': 'Enter a percentage above 50 and below 100.',
    });
  });

  it('asks for λ or γ where the rule needs one', () => {
    expect(problemsOf({ ...ready, rule: 'fixed' })).toEqual({
      'specification/penalty/value': 'Enter a number of 0 or more.',
    });
    expect(problemsOf({ ...ready, rule: 'prior', penaltyValue: '0' })).toEqual({
      'specification/penalty/value': 'Enter a number above 0.',
    });
  });

  it('puts the mixing in for elastic net alone', () => {
    expect(readDraft({ ...ready, method: 'elastic-net' })).toMatchObject({ fit: { specification: { mixing: 0.5 } } });
    expect(readDraft({ ...ready, method: 'lasso', mixing: 'nonsense' })).not.toHaveProperty('problems');
  });

  it('lets a rule that needs ridge give way when the method changes', () => {
    expect(ruleInEffect({ ...ready, rule: 'evidence', method: 'lasso' })).toBe('minimum');
    expect(ruleInEffect({ ...ready, rule: 'evidence' })).toBe('evidence');
  });

  it('holds out by group or forward in time with the column of that kind', () => {
    expect(readDraft({ ...ready, scheme: 'grouped', groupColumn: 'yard' })).toMatchObject({
      fit: { specification: { validation: { scheme: 'grouped', column: 'yard', seed: 1 } } },
    });
    expect(readDraft({ ...ready, scheme: 'forward', gap: '30' })).toMatchObject({
      fit: { specification: { validation: { scheme: 'forward', column: 'booked', gap: 30 } } },
    });
  });

  it('keeps what was chosen when another revision has the same columns', () => {
    const changed = { ...ready, inputs: ready.inputs.map((input) => ({ ...input, label: `The ${input.column}` })) };
    const next = draftOn({ ...revision, id: 'revision0004', columns: revision.columns.slice(0, 3) }, changed);
    expect(next.revisionId).toBe('revision0004');
    expect(next.target).toBe('hours');
    expect(next.inputs.map((input) => input.label)).toEqual(['The hours', 'The length', 'The displacement']);
    expect(next.groupColumn).toBe('');
  });

  it('keeps complaints about inputs under their columns', () => {
    const problems = new Map([
      ['specification/inputs/1/transform', 'Displacement has zeros.'],
      ['specification/inputs/1', 'It cannot be on the log scale.'],
      ['specification/target/column', 'No.'],
    ]);
    expect([...problemsByInput(problems, ready)]).toEqual([
      ['input:displacement', 'Displacement has zeros. It cannot be on the log scale.'],
      ['specification/target/column', 'No.'],
    ]);
  });
});
