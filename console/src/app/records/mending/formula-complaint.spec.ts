import { columnInFormula, formulaComplaint } from './formula-complaint';

describe('a complaint about a formula', () => {
  it('is taken apart at the character that it names', () => {
    expect(formulaComplaint('“>” does not fit here (at character 10)', '[Beam] > > 3')).toEqual({
      words: '“>” does not fit here',
      place: { before: '[Beam] > ', at: '>', after: ' 3', character: 10 },
    });
  });

  it('names what follows where the place is a space', () => {
    expect(formulaComplaint('“>” does not fit here (at character 9)', '[Beam] > > 3').place).toMatchObject({
      at: '>',
      character: 10,
    });
  });

  it('points behind the end of a formula that breaks off', () => {
    const { place } = formulaComplaint('The formula breaks off (at character 9)', '[Beam] >');
    expect(place).toEqual({ before: '[Beam] >', at: '\u00a0', after: '', character: 9 });
  });

  it('stays whole where it names no character', () => {
    expect(formulaComplaint('Enter a condition', '')).toEqual({ words: 'Enter a condition' });
  });

  it('names a column with its own bracket written twice', () => {
    expect(columnInFormula('Length [m]')).toBe('[Length [m]]]');
  });
});
