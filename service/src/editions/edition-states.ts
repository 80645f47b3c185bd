import { DeskError } from '../errors';
import type { EditionState } from './editions-store';

/** What a person can do with an edition; the only table of its states. */
export const EditionAct = {
  submit: 'submit',
  putInForce: 'put-in-force',
  sendBack: 'send-back',
  withdraw: 'withdraw',
} as const;
export type EditionAct = (typeof EditionAct)[keyof typeof EditionAct];

const actsOf: Readonly<Record<EditionState, readonly EditionAct[]>> = {
  draft: ['submit', 'withdraw'],
  'under-review': ['put-in-force', 'send-back', 'withdraw'],
  'in-force': ['withdraw'],
  superseded: ['withdraw'],
  withdrawn: [],
};

const stateWords: Readonly<Record<EditionState, string>> = {
  draft: 'a draft',
  'under-review': 'under review',
  'in-force': 'in force',
  superseded: 'superseded',
  withdrawn: 'withdrawn',
};

const actWords: Readonly<Record<EditionAct, string>> = {
  submit: 'be submitted for review',
  'put-in-force': 'be put in force',
  'send-back': 'be sent back',
  withdraw: 'be withdrawn',
};

/** Refuses what the state does not allow, saying what it does. */
export function requireAct(edition: { readonly number: number; readonly state: EditionState }, act: EditionAct): void {
  if (actsOf[edition.state].includes(act)) return;
  throw new DeskError(
    'edition-state',
    `Edition ${edition.number} is ${stateWords[edition.state]}: it cannot ${actWords[act]}. ${whatCanBeDone(edition.state)}`,
  );
}

function whatCanBeDone(state: EditionState): string {
  const [first, ...others] = actsOf[state].map((act) => actWords[act]);
  return first === undefined ? 'Draw up another edition from a fit.' : `It can ${[first, ...others].join(', or ')}.`;
}
