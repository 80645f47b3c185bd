import { carriedChoices, hasChoices } from './carried-choices';

const columns = [{ name: 'draught', missingMarks: ['999'] }];

describe('what was chosen for an earlier file', () => {
  it('holds for the columns that the newer one has, and its layout is left behind', () => {
    const choices = { delimiter: ';' as const, headerLine: 3, missingMarks: ['k.A.'], columns };
    const reading = { choices, setAside: [] };
    expect(carriedChoices(reading, new Set(['draught']))).toEqual({ missingMarks: ['k.A.'], columns });
    expect(carriedChoices(reading, new Set(['beam']))).toEqual({ missingMarks: ['k.A.'] });
  });

  it('keeps aside what was set aside, even if no one chose it column by column', () => {
    const reading = { choices: { columns }, setAside: ['owner'] };
    expect(carriedChoices(reading, new Set(['owner', 'draught']))).toEqual({
      columns: [...columns, { name: 'owner', setAside: true }],
    });
    expect(hasChoices({ choices: {}, setAside: ['owner'] })).toBe(true);
    expect(hasChoices({ choices: { delimiter: ';' }, setAside: [] })).toBe(false);
  });
});
