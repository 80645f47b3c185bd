import { headingFrom, headingLevelFrom, localeFrom, switchFrom, textFrom } from './attributes';

describe('attributes', () => {
  it.each([
    [' refit-labour ', 'refit-labour'],
    [null, ''],
    [undefined, ''],
    [7, ''],
  ])('takes the text %j as %j', (value, expected) => {
    expect(textFrom(value)).toBe(expected);
  });

  it('tells an empty heading, which means none, from one that is not given', () => {
    expect(headingFrom('')).toBe('');
    expect(headingFrom(null)).toBeNull();
    expect(headingFrom(' Hours ')).toBe('Hours');
  });

  it.each([
    ['3', 3],
    [4, 4],
    ['0', 2],
    ['6', 2],
    ['2.5', 2],
    ['', 2],
    [null, 2],
  ])('takes the heading level %j as %d', (value, expected) => {
    expect(headingLevelFrom(value)).toBe(expected);
  });

  it.each([
    ['no', false],
    [' No ', false],
    ['false', false],
    [false, false],
    ['yes', true],
    ['', true],
    [null, true],
    [true, true],
  ])('takes the switch %j as %s', (value, expected) => {
    expect(switchFrom(value)).toBe(expected);
  });

  it.each([
    ['de-AT', 'de-AT'],
    ['no such language', undefined],
    [null, undefined],
  ])('takes the language %j as %s', (value, expected) => {
    expect(localeFrom(value)).toBe(expected);
  });
});
