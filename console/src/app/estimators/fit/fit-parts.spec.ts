import { result } from '../testing/refit-labour';
import { diagnosticsOf, hasTables } from './diagnostics';
import { penaltyEquivalents } from './penalty-equivalents';
import { droppedInputs, weightGroups } from './weight-groups';

describe('the weights of a fit', () => {
  it('stand by input, heaviest first, a category’s levels together', () => {
    const groups = weightGroups(result.weights);
    expect(groups.map((group) => group.input)).toEqual(['displacement', 'length', 'hull']);
    expect(groups[2].parts.map((part) => part.name)).toEqual(['GRP', 'steel']);
    expect(groups[2].size).toBeCloseTo(Math.sqrt(5.8 ** 2 + 7.2 ** 2), 12);
  });

  it('tell which inputs were dropped', () => {
    const weights = [...result.weights, { input: 'rig', value: 0, standardised: 0 }];
    expect(droppedInputs(weightGroups(weights))).toEqual(['rig']);
  });
});

describe('the penalty and its equivalents', () => {
  it('are λ, λ·n, effective degrees of freedom and the prior', () => {
    expect(penaltyEquivalents(result, 'h').map((row) => row.figure)).toEqual(['1', '2,391', '2.50', '0.790\u00a0h']);
  });

  it('have no prior where nothing holds the weights', () => {
    const free = { ...result, penalty: { ...result.penalty, lambda: 0, lambdaSum: 0, priorSd: null } };
    expect(penaltyEquivalents(free, 'h')[3].figure).toBe('none');
  });
});

describe('diagnostics beyond the contract', () => {
  it('are none when the engine gives none', () => {
    expect(diagnosticsOf(result)).toEqual({
      choices: [],
      coverage: [],
      inflation: [],
      conditionIndices: [],
      sharedLoad: [],
      influential: [],
      frequencies: [],
      learning: [],
      heldOut: [],
    });
    expect(hasTables(diagnosticsOf(result))).toBe(false);
  });

  it('are read where they have the expected shape and passed over where not', () => {
    const read = diagnosticsOf({
      penalty: { choices: [{ rule: 'evidence', lambda: 0.02 }, { rule: 'minimum' }] },
      accuracy: { coverageByQuarter: [{ from: 1, to: 2, records: 600, coverage: 0.91 }, { from: 'low' }] },
      diagnostics: {
        varianceInflation: [{ input: 'hull', level: 'steel', factor: null }],
        conditionIndices: [{ index: 31.2, proportions: [] }],
        sharedLoad: [
          {
            members: [{ input: 'length' }, { input: 'waterline' }],
            smallestCorrelation: 0.97,
            leastSquares: null,
            ridge: [3, 4],
            lasso: [7, 0],
          },
          { members: [{ input: 'rig' }] },
        ],
        selectionFrequency: [{ input: 'rig', frequency: 0.4 }],
        learningCurve: [{ records: 400, rmse: 44 }],
        residuals: [
          { row: 0, recorded: 10, heldOutEstimate: 12, fitted: 11 },
          { row: 1, recorded: 10, heldOutEstimate: null },
        ],
        influential: [{ row: 4, cooksDistance: 0.3, leverage: 0.1, residual: 120 }, null],
      },
    });
    expect(read).toEqual({
      choices: [{ rule: 'evidence', lambda: 0.02 }],
      coverage: [{ from: 1, to: 2, records: 600, coverage: 0.91 }],
      inflation: [{ name: 'hull: steel', factor: null }],
      conditionIndices: [31.2],
      sharedLoad: [
        {
          members: ['length', 'waterline'],
          smallestCorrelation: 0.97,
          splits: [
            { method: 'Ridge', weights: [3, 4] },
            { method: 'Lasso', weights: [7, 0] },
          ],
        },
      ],
      frequencies: [{ name: 'rig', frequency: 0.4 }],
      learning: [{ records: 400, rmse: 44 }],
      heldOut: [{ row: 0, recorded: 10, estimate: 12 }],
      influential: [{ row: 4, cooksDistance: 0.3, leverage: 0.1, residual: 120 }],
    });
  });
});
