import { countChoices, fittingChoices, withColumnChange, withFileChange, withoutColumn } from './reading-choices';

describe('choices about reading a file', () => {
  it('leave the others alone, of the file and of its columns', () => {
    let choices = withFileChange({ decimal: ',' }, { headerLine: 3 });
    choices = withColumnChange(choices, 'crew', { kind: 'text' });
    choices = withColumnChange(choices, 'crew', { missingMarks: ['999'] });
    expect(choices).toEqual({
      decimal: ',',
      headerLine: 3,
      columns: [{ name: 'crew', kind: 'text', missingMarks: ['999'] }],
    });
    expect(countChoices(choices)).toBe(4);
  });

  it('go back to what is found when they are undefined, and leave nothing behind', () => {
    const chosen = withColumnChange({}, 'owner', { setAside: true });
    expect(withColumnChange(chosen, 'owner', { setAside: undefined })).toEqual({});
    expect(withoutColumn(chosen, 'owner')).toEqual({});
    expect(withFileChange({ decimal: ',' }, { decimal: undefined })).toEqual({});
  });

  it('count a unit of none as a choice', () => {
    expect(countChoices(withColumnChange({}, 'length', { unit: null }))).toBe(1);
  });

  it('are sent only for columns that the file has', () => {
    const choices = { decimal: ',' as const, columns: [{ name: 'crew', setAside: true }, { name: 'hull' }] };
    expect(fittingChoices(choices, new Set(['crew']))).toEqual({
      decimal: ',',
      columns: [{ name: 'crew', setAside: true }],
    });
    expect(fittingChoices(choices, new Set())).toEqual({ decimal: ',' });
  });

  it('leave out the unit of words and the order of what is no date', () => {
    const columns = [{ name: 'crew', kind: 'text' as const, unit: 'm', dateOrder: 'day-first' as const }];
    expect(fittingChoices({ columns }, new Set(['crew']))).toEqual({ columns: [{ name: 'crew', kind: 'text' }] });
  });
});
