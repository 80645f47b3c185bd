import { formatFactor, formatSigned, formatStepped, withUnit } from '../format/number-format';
import { Precision, precisionFor } from '../format/precision';
import { BeamLayout, BeamWeight } from './beam-layout';
import { BeamEvaluation } from './contribution';

/** How the diagram and its table write figures for one evaluation. */
export interface BeamWords {
  /** The figure in a box: the contribution in the target's unit, or its factor on the log scale. */
  readonly moves: (contribution: number) => string;
  /** With the unit, for running text. */
  readonly movesInWords: (contribution: number) => string;
  /** A value of the target with its unit. */
  readonly amount: (value: number) => string;
  readonly bareAmount: (value: number) => string;
  readonly arm: (arm: number) => string;
  readonly farArm: (arm: number) => string;
  readonly mass: (mass: number) => string;
  /** A contribution on the log scale itself, where arm × mass can be checked. */
  readonly logMoves: (contribution: number) => string;
}

const LOG_STEP = 0.001;

export function wordsFor({ value, interval, unit, scale }: BeamEvaluation, locale?: string): BeamWords {
  const { step }: Precision = precisionFor({ value, ...interval });
  const onLog = scale === 'log';
  const moves = (contribution: number): string =>
    onLog ? formatFactor(Math.exp(contribution), locale) : formatSigned(contribution, step, locale);
  return {
    moves,
    movesInWords: (contribution) => (onLog ? moves(contribution) : withUnit(moves(contribution), unit)),
    amount: (amount) => withUnit(formatStepped(amount, step, locale), unit),
    bareAmount: (amount) => formatStepped(amount, step, locale),
    arm: (arm) => formatSigned(arm, 0.1, locale),
    farArm: (arm) => `at ${formatSigned(arm, Math.abs(arm) < 10 ? 0.1 : 1, locale)} SD`,
    mass: (mass) => formatStepped(mass, onLog ? LOG_STEP : step, locale),
    logMoves: (contribution) => formatSigned(contribution, LOG_STEP, locale),
  };
}

/** The one sentence that a person who cannot see the picture needs. */
export function describeBeam(evaluation: BeamEvaluation, layout: BeamLayout, words: BeamWords): string {
  const largest = [...layout.weights]
    .sort((a, b) => Math.abs(b.contribution) - Math.abs(a.contribution))
    .filter(({ moves }) => moves !== 'nothing')
    .slice(0, 3)
    .map((weight) => describeWeight(weight, words));
  const ends = `The typical case comes to ${words.amount(evaluation.typical)}, this case to ${words.amount(evaluation.value)}.`;
  return largest.length === 0 ? `${ends} Nothing moves it.` : `${ends} What moves it most: ${largest.join('; ')}.`;
}

export function captionOf(evaluation: BeamEvaluation, layout: BeamLayout, words: BeamWords): string {
  const floats = layout.weights.some(({ hangs }) => hangs === 'float');
  const shapes = floats
    ? 'Loads (square) pull their side down, floats (round, dashed) lift it.'
    : 'Loads pull their side down.';
  const others = layout.gatheredCount > 0 ? ` “The others” are ${layout.gatheredCount} smaller inputs together.` : '';
  const together = words.movesInWords(layout.sum);
  const typical = words.amount(evaluation.typical);
  const figure =
    evaluation.scale === 'log'
      ? `Width is mass, place is arm; the figure is the factor by which the input changes the estimate. The beam’s tilt is all of them together, ${together} on a typical ${typical}.`
      : `Width is mass, place is arm, the figure is what the two make together${evaluation.unit ? `, in ${evaluation.unit}` : ''}. The beam’s tilt is their sum, ${together} against a typical ${typical}.`;
  return `${shapes} ${figure}${others}`;
}

function describeWeight({ fullLabel, moves, contribution }: BeamWeight, words: BeamWords): string {
  return `${fullLabel} ${moves === 'raises' ? 'raises' : 'lowers'} it, ${words.movesInWords(contribution)}`;
}
