import { revision } from '../testing/refit-labour';
import { emptyDraft, type FitDraft } from './fit-draft';
import { readRowFilter } from './read-row-filter';

const asked = (change: Partial<FitDraft>) => readRowFilter({ ...emptyDraft, ...change }, revision);

describe('the records asked for', () => {
  it('are all of them where no column is named', () => {
    expect(asked({})).toEqual({ problems: {} });
  });

  it('are those of the ticked levels', () => {
    expect(asked({ filterColumn: 'hull', filterLevels: ['GRP'] }).filter).toEqual({ column: 'hull', equals: ['GRP'] });
    expect(asked({ filterColumn: 'hull' }).problems).toEqual({ equals: 'Tick what hull may be, or use all records.' });
  });

  it('lie between two numbers, or beyond one', () => {
    expect(asked({ filterColumn: 'length', filterFrom: '6', filterTo: '12,5' }).filter).toEqual({
      column: 'length',
      from: 6,
      to: 12.5,
    });
    expect(asked({ filterColumn: 'length', filterTo: '9' }).filter).toEqual({ column: 'length', to: 9 });
    expect(asked({ filterColumn: 'length', filterFrom: '9', filterTo: '6' }).problems).toHaveProperty('to');
    expect(asked({ filterColumn: 'length', filterFrom: 'x' }).problems).toHaveProperty('from');
    expect(asked({ filterColumn: 'length' }).problems).toHaveProperty('from');
  });

  it('lie between two days, counted from 1970', () => {
    expect(asked({ filterColumn: 'booked', filterFrom: '1970-01-11' }).filter).toEqual({ column: 'booked', from: 10 });
  });
});
