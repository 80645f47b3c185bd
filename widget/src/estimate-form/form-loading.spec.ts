import type { PublishedEstimator } from '../api/contract';
import { EstimatesError } from '../api/estimates-error';
import { estimatorExample } from '../api/examples.fixture';
import { FormOnPage } from './testing/form-on-page';

let form: FormOnPage;
beforeEach(() => (form = new FormOnPage()));
afterEach(() => form.leave());

describe('EstimateForm, while it loads', () => {
  it('says that it is loading, before and after it has asked', async () => {
    form.desk.describe = () => new Promise(() => undefined);
    await form.open();
    expect(form.text('[role=status]')).toBe('Loading the form.');
    expect(form.desk.described).toEqual([
      { connection: expect.objectContaining({ key: 'tb_key' }), slug: 'refit-labour' },
    ]);
  });

  it('asks nothing and says what is missing without its attributes', async () => {
    await form.open({ key: '' });
    expect(form.desk.described).toHaveLength(0);
    expect(form.text('.failure')).toContain('The element needs the attribute “key”.');
  });

  it('shows a failure, and tries again when asked to', async () => {
    form.desk.describe = () => Promise.reject(new EstimatesError('unreachable', 'No answer.'));
    await form.open();
    expect(form.text('.failure')).toContain('The estimating desk did not answer');
    expect(form.text('[role=status]')).toContain('The estimating desk did not answer');
    form.desk.describe = () => Promise.resolve(estimatorExample());
    await form.press('Try again');
    expect(form.text('.heading')).toBe('Refit labour');
  });

  it('dispatches a failure only when a person asked for it', async () => {
    form.desk.describe = () => Promise.reject(new EstimatesError('unavailable', 'Not now.'));
    await form.open();
    expect(form.events).toHaveLength(0);
    await form.press('Try again');
    expect(form.events.map(({ type, detail }) => [type, detail.code])).toEqual([['tarebeam-error', 'unavailable']]);
  });

  it('says so when no edition is in force', async () => {
    form.desk.describe = () =>
      Promise.reject(
        new EstimatesError('nothing-in-force', 'x', { detail: 'No edition is in force; ask the form.desk.' }),
      );
    await form.open();
    expect(form.text('.failure-heading')).toBe('No estimate is offered at present');
    expect(form.text('.failure')).toContain('No edition is in force; ask the form.desk.');
  });

  it('needs no entries where the estimator has no inputs', async () => {
    form.desk.describe = () => Promise.resolve({ ...estimatorExample(), inputs: { type: 'object', properties: {} } });
    await form.open();
    expect(form.text('form')).toContain('This estimate needs no entries.');
    await form.press('Estimate');
    expect(form.desk.asked[0].inputs).toEqual({});
  });

  it('follows an attribute that is changed, and drops a late answer to the former', async () => {
    let answerLate: (estimator: PublishedEstimator) => void = () => undefined;
    form.desk.describe = () => new Promise((resolve) => (answerLate = resolve));
    await form.open();
    form.desk.describe = () => Promise.resolve({ ...estimatorExample(), name: 'Crane time' });
    form.fixture.componentRef.setInput('estimator', 'crane-time');
    await form.settle();
    answerLate(estimatorExample());
    await form.settle();
    expect(form.text('.heading')).toBe('Crane time');
  });
});
