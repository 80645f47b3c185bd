import {
  atMostIn,
  conditionWords,
  equalIn,
  levelIn,
  missingIn,
  otherLevelsIn,
  outsideIn,
  stretchIn,
} from './rows-condition';

const LENGTH = { name: 'Length overall', kind: 'numeric' } as const;
const FINISHED = { name: 'Finished', kind: 'date' } as const;
const HULL = { name: 'Hull', kind: 'category' } as const;

describe('conditions on rows', () => {
  it('doubles a bracket in a name and a quotation mark in a text', () => {
    expect(missingIn({ name: 'beam [m]', kind: 'numeric' })).toBe('[beam [m]]] is missing');
    expect(levelIn(HULL, 'so-called "GRP"')).toBe('[Hull] = "so-called ""GRP"""');
  });

  it('takes a bar with its lower end and without its upper one, the last bar with both', () => {
    expect(stretchIn(LENGTH, { from: 5, to: 10, closed: false })).toBe(
      '[Length overall] >= 5 and [Length overall] < 10',
    );
    expect(stretchIn(LENGTH, { from: 10, to: 24.6, closed: true })).toBe(
      '[Length overall] >= 10 and [Length overall] <= 24.6',
    );
  });

  it('holds exactly the whole days between edges that fall inside a day', () => {
    expect(stretchIn(FINISHED, { from: 18_550.5, to: 18_552.25, closed: false })).toBe(
      '[Finished] >= "2020-10-16" and [Finished] < "2020-10-18"',
    );
  });

  it('holds exactly the whole days up to a bound, or beyond bounds, that fall inside a day', () => {
    expect(atMostIn(FINISHED, 18_550.5)).toBe('[Finished] <= "2020-10-15"');
    expect(outsideIn(FINISHED, 18_550.5, 18_552.25)).toBe('[Finished] < "2020-10-16" or [Finished] > "2020-10-17"');
  });

  it('keeps the spaces at the ends of a level, which tell it from another', () => {
    expect(levelIn(HULL, ' STEEL ')).toBe('[Hull] = " STEEL "');
  });

  it('writes a reading with every digit', () => {
    expect(equalIn(LENGTH, 0.1 + 0.2)).toBe('[Length overall] = 0.30000000000000004');
    expect(equalIn(FINISHED, 18_550)).toBe('[Finished] = "2020-10-15"');
    expect(outsideIn(LENGTH, -2.1, 21.1)).toBe('[Length overall] < -2.1 or [Length overall] > 21.1');
  });

  it('gives none where it would be longer than the service takes', () => {
    expect(otherLevelsIn(HULL, ['GRP', 'wood'])).toBe('[Hull] <> "GRP" and [Hull] <> "wood"');
    expect(otherLevelsIn(HULL, Array<string>(60).fill('aluminium'))).toBeUndefined();
  });
});

describe('conditionWords', () => {
  it.each([
    ['[Length overall] is missing', 'Length overall is missing'],
    ['[beam [m]]] >= 5 and [beam [m]]] < 10', 'beam [m] at least 5 and beam [m] below 10'],
    ['[Hull] = "so-called ""GRP"""', 'Hull is “so-called "GRP"”'],
    ['[a] < -2.1 or [a] > 21.1', 'a below -2.1 or a above 21.1'],
    ['log(length) <> 2', 'log(length) is not 2'],
    ['[never closed', '[never closed'],
  ])('says %s as %s', (condition, words) => {
    expect(conditionWords(condition)).toBe(words);
  });
});
