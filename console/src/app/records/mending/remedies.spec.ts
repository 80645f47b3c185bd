import type { MendStep } from '../../api/contract';
import { holdsRemedy, withRemedy } from './remedies';

const FEET: MendStep = { kind: 'convert-unit', column: 'Beam', factor: 0.3048, rows: [3, 14] };
const POUNDS: MendStep = { kind: 'convert-unit', column: 'Weight', factor: 0.45359237, rows: [8] };
const RENAME: MendStep = { kind: 'rename', column: 'Beam', to: 'Width' };
const REPEATED: MendStep = { kind: 'drop-repeated-rows' };
const drop = (...rows: number[]): MendStep => ({ kind: 'drop-rows', rows });

describe('adding a remedy to the list', () => {
  it('puts it at the end while every step speaks of the revision as it stands', () => {
    expect(withRemedy([FEET], [POUNDS])).toEqual([FEET, POUNDS]);
  });

  it.each([
    ['renames', RENAME],
    ['drops rows', drop(1)],
    ['drops repeated rows', REPEATED],
    ['sets a column aside', { kind: 'set-aside', column: 'Beam' } as const],
  ])('puts it before the first step that %s, since it names rows and columns of the revision', (_, step) => {
    expect(withRemedy([POUNDS, step], [FEET])).toEqual([POUNDS, FEET, step]);
  });

  it('sets columns aside last and in the order of the findings, while none has another name', () => {
    const aside = (column: string): MendStep => ({ kind: 'set-aside', column });
    expect(withRemedy([aside('Yard')], [aside('Beam'), FEET])).toEqual([FEET, aside('Yard'), aside('Beam')]);
    expect(withRemedy([RENAME], [aside('Beam')])).toEqual([aside('Beam'), RENAME]);
  });

  it('adds nothing twice, whichever order the fields stand in', () => {
    const turned: MendStep = { rows: [3, 14], factor: 0.3048, column: 'Beam', kind: 'convert-unit' };
    expect(withRemedy([FEET], [turned])).toEqual([FEET]);
    expect(holdsRemedy([FEET], [turned])).toBe(true);
    expect(holdsRemedy([FEET], [turned, POUNDS])).toBe(false);
  });

  it('drops rows of two remedies at once, so that the first does not shift the numbers of the second', () => {
    expect(withRemedy([drop(5, 9)], [drop(7)])).toEqual([drop(5, 7, 9)]);
    expect(holdsRemedy([drop(5, 7, 9)], [drop(7)])).toBe(true);
    expect(holdsRemedy([drop(5, 9)], [drop(7)])).toBe(false);
  });

  it('drops listed rows before repeated ones are sought', () => {
    expect(withRemedy([REPEATED], [drop(7)])).toEqual([drop(7), REPEATED]);
  });

  it('seeks repeated rows last where a step behind names rows by number', () => {
    expect(withRemedy([drop(7)], [REPEATED])).toEqual([drop(7), REPEATED]);
  });

  it('says so where the rows to drop cannot be told any more', () => {
    expect(withRemedy([REPEATED, FEET], [drop(7)])).toBeUndefined();
  });
});
