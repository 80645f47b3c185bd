import type { MendStep } from '../../api/contract';
import { countOf } from '../../ui/figure';
import { nameOfStep, wordsOfStep } from './step-words';
import type { Steps } from './steps-history';
import type { Outlook, StepEffect } from './trials';

/** A step as the list shows it. */
export interface StepRow {
  readonly step: MendStep;
  readonly name: string;
  readonly words: string;
  /** `changes 14 rows`; undefined where it is not known or concerns whole columns. */
  readonly effect?: string;
  /** Whether it was found to do nothing. */
  readonly idle: boolean;
  /** Why it cannot be done. */
  readonly reason?: string;
  /** An earlier step cannot be done. */
  readonly waits: boolean;
  /** Its row numbers count what earlier steps left. */
  readonly renumbered: boolean;
  /** The rows that it names, as the rows of the revision are asked for. */
  readonly numbers?: string;
}

interface Tried {
  readonly steps: Steps;
  readonly outlook: Outlook;
}

export function rowsOfSteps(steps: Steps, tried: Tried | undefined): readonly StepRow[] {
  const effects = effectsByStep(tried);
  // What was found about another list says nothing about places in this one.
  const refused = tried?.steps === steps ? tried.outlook.refused : undefined;
  return steps.map((step, index) => {
    const effect = effects.get(step);
    const renumbered = namesRows(step) && steps.slice(0, index).some(dropsRows);
    return {
      step,
      name: nameOfStep(step),
      words: effect?.told ?? `${wordsOfStep(step)}.`,
      effect: effect && effectWords(step, effect),
      idle: effect?.rowsConcerned === 0,
      reason: refused?.index === index ? refused.reason : undefined,
      waits: refused !== undefined && index > refused.index,
      renumbered,
      numbers: renumbered ? undefined : numbersOf(step),
    };
  });
}

/** While a changed list is being tried, a step is still told as it was found before. */
function effectsByStep(tried: Tried | undefined): ReadonlyMap<MendStep, StepEffect> {
  return new Map(tried?.outlook.effects.map((effect, index) => [tried.steps[index], effect]));
}

export function dropsRows({ kind }: MendStep): boolean {
  return kind === 'drop-rows' || kind === 'drop-repeated-rows';
}

export function namesRows(step: MendStep): boolean {
  return 'rows' in step && step.rows !== undefined;
}

/** Rows that can be asked for at once. */
const MOST_ROWS = 200;

function numbersOf(step: MendStep): string | undefined {
  return 'rows' in step ? step.rows?.slice(0, MOST_ROWS).join(',') : undefined;
}

function effectWords(step: MendStep, { rowsConcerned }: StepEffect): string | undefined {
  if (rowsConcerned === null) return undefined;
  const verb = dropsRows(step) ? 'drops' : 'changes';
  return rowsConcerned === 0 ? `${verb} no row` : `${verb} ${countOf(rowsConcerned, 'row')}`;
}
