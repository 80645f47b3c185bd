import type { FitResult } from '../../api/contract';
import { significant, withUnit } from '../words/precision';

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
    { name: 'Penalty λ', figure: significant(lambda), explanation: 'per record, on standardised inputs' },
    { name: 'Sum form λ·n', figure: significant(lambdaSum), explanation: 'added to the plain sum of squares' },
    {
      name: 'Effective degrees of freedom',
      figure: significant(effectiveDegreesOfFreedom),
      explanation: `what ${result.weights.length} weights amount to while they are held`,
    },
    {
      name: 'Prior standard deviation γ',
      figure: priorSd === null ? 'none' : withUnit(significant(priorSd), scaleUnit),
      explanation: priorSd === null ? 'nothing holds the weights toward zero' : 'the prior on a standardised weight that this penalty stands for',
    },
  ];
}
