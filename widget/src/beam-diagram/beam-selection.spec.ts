import { selectWeights, THE_OTHERS } from './beam-selection';
import { BeamContribution, sumOf } from './contribution';

function weights(count: number): BeamContribution[] {
  return Array.from({ length: count }, (_, index) => {
    const mass = count - index;
    const arm = index % 2 === 0 ? 1.5 : -0.5;
    return { input: `input-${index}`, arm, mass, contribution: arm * mass };
  });
}

describe('selectWeights', () => {
  it('draws all of twelve', () => {
    const { drawn, gathered } = selectWeights(weights(12));
    expect(drawn).toHaveLength(12);
    expect(gathered).toHaveLength(0);
    expect(drawn.map(({ input }) => input)).not.toContain(THE_OTHERS);
  });

  it('draws the largest eleven of thirteen and one load for the others', () => {
    const { drawn, gathered } = selectWeights(weights(13));
    expect(drawn).toHaveLength(12);
    expect(gathered).toHaveLength(2);
    expect(drawn[11].input).toBe(THE_OTHERS);
    const smallestDrawn = Math.min(...drawn.slice(0, 11).map(({ contribution }) => Math.abs(contribution)));
    const largestGathered = Math.max(...gathered.map(({ contribution }) => Math.abs(contribution)));
    expect(smallestDrawn).toBeGreaterThanOrEqual(largestGathered);
  });

  it.each([3, 12, 13, 40])('keeps the sum of %d contributions', (count) => {
    const all = weights(count);
    expect(sumOf(selectWeights(all).drawn)).toBeCloseTo(sumOf(all), 10);
  });

  it('hangs the others where their moment is kept: arm × mass is their sum', () => {
    const { drawn, gathered } = selectWeights(weights(20));
    const others = drawn[11];
    expect(others.contribution).toBeCloseTo(sumOf(gathered), 10);
    expect(others.arm * others.mass).toBeCloseTo(others.contribution, 10);
    expect(others.float).toBeFalsy();
  });

  it('leaves out an input that the lasso dropped', () => {
    const dropped = { input: 'rig', arm: 0, mass: 0, contribution: 0 };
    expect(selectWeights([...weights(2), dropped]).drawn.map(({ input }) => input)).not.toContain('rig');
  });

  it('counts only what hangs towards the twelve', () => {
    const dropped = Array.from({ length: 5 }, (_, index) => ({
      input: `gone-${index}`,
      arm: 0,
      mass: 0,
      contribution: 0,
    }));
    expect(selectWeights([...weights(12), ...dropped]).gathered).toHaveLength(0);
  });

  it('does not change the list that it was given', () => {
    const all = weights(5).reverse();
    const before = [...all];
    selectWeights(all);
    expect(all).toEqual(before);
  });
});
