import { inputSchema } from '../testing/refit-labour';
import { caseFields } from './case-fields';
import { caseTexts, fieldHint, readCase, typicalDraft } from './read-case';

const fields = caseFields(inputSchema);

describe('a case', () => {
  it('starts from the typical one', () => {
    expect(typicalDraft(fields)).toEqual({ length: '11.2', displacement: '7.1', hull: 'GRP' });
  });

  it('starts from a year that is whole and a length to a tenth', () => {
    const year = { ...fields[0], name: 'year', typical: 1993.7, range: { least: 1958, greatest: 2024 } };
    const length = { ...fields[0], typical: 11.2187 };
    expect(typicalDraft([year, length])).toEqual({ year: '1994', length: '11.2' });
  });

  it('is read as numbers and levels', () => {
    expect(readCase(fields, { length: '12,6', displacement: '9.8 t', hull: 'steel' })).toEqual({
      inputs: { length: 12.6, displacement: 9.8, hull: 'steel' },
    });
  });

  it('says of each field what is wrong with it', () => {
    expect(readCase(fields, { length: '', displacement: 'x', hull: '' })).toEqual({
      problems: {
        length: 'Enter length overall.',
        displacement: '“x” is not a number. Write it like 12.5.',
        hull: 'Choose hull material.',
      },
    });
  });

  it('sends an optional field left empty as missing', () => {
    const [length] = fields;
    expect(readCase([{ ...length, required: false }], {})).toEqual({ inputs: { length: null } });
  });

  it('is read back with its units', () => {
    expect(caseTexts(fields, { length: 12.6, displacement: null, hull: 'steel' })).toEqual({
      length: '12.6\u00a0m',
      displacement: 'not given',
      hull: 'steel',
    });
  });

  it('names help and what the records cover under the field', () => {
    expect(fieldHint(fields[0])).toBe('Without the bowsprit. Recorded 6.1 to 18.4\u00a0m.');
    expect(fieldHint(fields[2])).toBeUndefined();
  });
});
