import type { EditionState } from '../../api/contract';
import { EDITION_STAMPS } from '../../ui/stamps';
import type { Stamp } from '../../ui/status-stamp';

/** `In force · edition 4`. */
export function editionStamp({ state, number }: { readonly state: EditionState; readonly number: number }): Stamp {
  const { word, tone } = EDITION_STAMPS[state];
  return { word: `${word} · edition ${number}`, tone };
}
