import { rulesFor } from './method-words';
import { inputRemarks, specificationWords } from './specification-words';
import type { Specification } from '../../api/contract';

const specification: Specification = {
  target: { column: 'hours', transform: 'log' },
  inputs: [{ column: 'length' }, { column: 'beam' }],
  method: 'ridge',
  penalty: { rule: 'one-standard-error' },
  validation: { scheme: 'grouped', folds: 9, column: 'yard', seed: 7 },
  intervalLevel: 0.9,
};

describe('a specification in words', () => {
  it('names target, inputs, method, rule, folds and level', () => {
    expect(specificationWords(specification, 'h')).toEqual([
      'Estimate hours on the log scale, so that inputs act as factors.',
      'From 2 inputs: length, beam.',
      'Method: ridge.',
      'Penalty: the strongest within one standard error of the least held-out error.',
      'Held out: 9 folds that keep each yard together, seed 7.',
      'Intervals are to hold 90% of cases.',
    ]);
  });

  it('says which records it keeps to', () => {
    const byLevel = specificationWords(
      { ...specification, rowFilter: { column: 'hull', equals: ['GRP', 'steel'] } },
      'h',
    );
    expect(byLevel).toContain('Only records whose hull is GRP or steel.');
    const byRange = specificationWords({ ...specification, rowFilter: { column: 'length', from: 6.5 } }, 'h');
    expect(byRange).toContain('Only records whose length runs from 6.5 (dates as days since 1970-01-01).');
  });

  it('says nothing of a penalty for least squares', () => {
    const words = specificationWords({ ...specification, method: 'least-squares' }, 'h');
    expect(words.some((line) => line.startsWith('Penalty'))).toBe(false);
  });

  it('states a prior with the unit of the target', () => {
    const words = specificationWords({ ...specification, penalty: { rule: 'prior', value: 25 } }, 'h');
    expect(words).toContain('Penalty: from the prior that a standardised weight has a standard deviation of 25 h.');
  });

  it('names the gap of a forward validation', () => {
    const words = specificationWords(
      { ...specification, validation: { scheme: 'forward', folds: 5, column: 'booked', gap: 30 } },
      'h',
    );
    expect(words).toContain('Held out: 5 folds forward in booked, leaving out 30 between past and future.');
  });

  it('says what is asked of an input beyond its column', () => {
    expect(inputRemarks({ column: 'length' })).toEqual([]);
    expect(
      inputRemarks({ column: 'length', transform: 'log', missing: 'typical', penaltyFactor: 0, sign: 'not-negative' }),
    ).toEqual([
      'on the log scale',
      'a missing reading counts as typical',
      'left free of the penalty',
      'weight not below zero',
    ]);
  });

  it('offers rules that need ridge only with ridge', () => {
    expect(rulesFor('ridge').map((rule) => rule.value)).toContain('evidence');
    expect(rulesFor('lasso').map((rule) => rule.value)).toEqual(['minimum', 'one-standard-error', 'fixed']);
    expect(rulesFor('least-squares')).toEqual([]);
  });
});
