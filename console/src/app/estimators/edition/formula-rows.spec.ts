import { edition } from '../testing/refit-labour';
import { formulaRows, formulaWords } from './formula-rows';

describe('the formula of an edition', () => {
  it('has one row a weight, levels said as conditions', () => {
    expect(formulaRows(edition).map((row) => row.times)).toEqual([
      'length',
      'displacement',
      '1 when hull is “GRP”, else 0',
      '1 when hull is “steel”, else 0',
    ]);
  });

  it('says by what transform a reading enters', () => {
    const [length] = formulaRows(edition, [{ column: 'length', transform: 'log' }]);
    expect(length.times).toBe('the natural logarithm of length');
  });

  it('leaves out weights of zero', () => {
    expect(formulaRows({ weights: [{ input: 'rig', value: 0, standardised: 0 }] })).toEqual([]);
  });

  it('adds up to the estimate itself on the original scale', () => {
    expect(formulaWords(edition)).toBe('Estimate, in h = −41.2370 plus the terms below.');
  });

  it('adds up to a logarithm on the log scale, with the smearing factor when it is given', () => {
    const logged = { ...edition, scale: 'log' as const, intercept: 2.5 };
    expect(formulaWords(logged)).toBe('Natural logarithm of the estimate = 2.50000 plus the terms below.');
    const smeared = { ...logged, smearing: 1.0213 };
    expect(formulaWords(smeared)).toContain('1.02130 × e to the power of');
  });
});
