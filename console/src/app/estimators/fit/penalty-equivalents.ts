import type { FitResult } from '../../api/contract';
import { formatFigure } from '../../ui/figure';

/** One way of saying how hard the weights are held. */
export interface PenaltyEquivalent {
  readonly name: string;
  readonly figure: string;
  readonly explanation: string;
}

/** The chosen penalty in the four ways in which textbooks and programs state it. */
export function penaltyEquivalents(result: FitResult, scaleUnit: string): readonly PenaltyEquivalent[] {
  const { lambda, lambdaSum, effectiveDegreesOfFreedom, priorSd } = result.penalty;
  return [
    {
      name: 'Penalty λ',
      figure: formatFigure(lambda, { significant: 3 }),
      explanation: 'per record, on standardised inputs',
    },
    {
      name: 'Sum form λ·n',
      figure: formatFigure(lambdaSum, { significant: 3 }),
      explanation: 'added to the plain sum of squares',
    },
    {
      name: 'Effective degrees of freedom',
      figure: formatFigure(effectiveDegreesOfFreedom, { significant: 3 }),
      explanation: `what ${result.weights.length} weights amount to while they are held`,
    },
    {
      name: 'Prior standard deviation γ',
      figure: priorSd === null ? 'none' : formatFigure(priorSd, { significant: 3, unit: scaleUnit }),
      explanation:
        priorSd === null
          ? 'nothing holds the weights toward zero'
          : 'the prior on a standardised weight that this penalty stands for',
    },
  ];
}
