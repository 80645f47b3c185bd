import { estimateExample, estimatorExample } from '../api/examples.fixture';
import { AnsweredCase, caseTexts, plainText } from './answered-case';
import { fieldsFrom } from './fields-from-schema';

const estimator = estimatorExample();
const answered: AnsweredCase = {
  estimator,
  fields: fieldsFrom(estimator.inputs),
  inputs: { length_overall: 12.6, displacement: 30, hull: 'steel', scope: 'deck' },
  estimate: estimateExample(),
};

describe('an answered case', () => {
  it('shows each input as it was asked', () => {
    expect(caseTexts(answered, 'en-GB')).toMatchObject({
      displacement: '30\u00a0t',
      hull: 'steel',
      winter: 'not given',
    });
  });

  it('becomes plain text with the interval, flags, case, cautions, edition and reference', () => {
    expect(plainText(answered, 'en-GB').split('\n')).toEqual([
      'Refit labour: 512 hours',
      'Nine of ten such cases come to between 440 and 590 hours.',
      'Mind: Displacement 30 t lies outside the records.',
      '',
      'Length overall: 12.6 m',
      'Displacement: 30 t',
      'Hull material: steel',
      'Scope of work: deck',
      'Winter booking: not given',
      'Booked: not given',
      '',
      'An estimate is not a quotation.',
      'Edition 4, reference e5k2m8q1, 1 December 2026',
    ]);
  });
});
