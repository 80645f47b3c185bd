import { EstimatesError } from '../api/estimates-error';
import { estimateExample } from '../api/examples.fixture';
import { FormOnPage } from './testing/form-on-page';

let form: FormOnPage;
beforeEach(() => (form = new FormOnPage()));
afterEach(() => form.leave());

describe('EstimateForm, asking', () => {
  it('sends the case and shows the whole answer', async () => {
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    expect(form.desk.asked[0]).toMatchObject({
      slug: 'refit-labour',
      inputs: { length_overall: 12.6, displacement: 9.8, hull: 'steel', scope: 'deck' },
      connection: { key: 'tb_key', service: 'https://desk.example' },
    });
    expect(form.text('.value')).toBe('512 hours');
    expect(form.text('.interval')).toBe('Nine of ten such cases come to between 440 and 590 hours.');
    expect(form.text('.flags')).toContain('Displacement 30 t lies outside the records.');
    expect(form.text('.cautions')).toBe('An estimate is not a quotation.');
    expect(form.text('.reference')).toBe('Edition 4, reference e5k2m8q1, 1 December 2026');
    expect(form.root().querySelector('tb-beam-diagram svg')).not.toBeNull();
    expect(form.text('[role=status]')).toContain('The estimate is 512 hours.');
  });

  it('dispatches the estimate with the case, once', async () => {
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    expect(form.events.map(({ type }) => type)).toEqual(['tarebeam-estimate']);
    expect(form.events[0].detail).toEqual({ estimate: estimateExample(), inputs: form.desk.asked[0].inputs });
  });

  it('leaves out the beam where the page does not want it', async () => {
    await form.open({ showBeam: 'no' });
    await form.fillIn();
    await form.press('Estimate');
    expect(form.text('.value')).toBe('512 hours');
    expect(form.root().querySelector('tb-beam-diagram')).toBeNull();
  });

  it('says that an answer no longer belongs to the entries once they are changed', async () => {
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    expect(form.text('.result')).not.toContain('have been changed');
    await form.enter('Displacement', '12');
    expect(form.text('.result')).toContain('The entries have been changed since.');
  });

  it('does not ask twice at once', async () => {
    form.desk.ask = () => new Promise(() => undefined);
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    await form.press('Asking…');
    expect(form.desk.asked).toHaveLength(1);
  });

  it("puts the desk's problems beside their fields and dispatches the failure", async () => {
    const fields = [
      { input: 'scope', detail: 'this scope is no longer offered' },
      { input: null, detail: 'must have mast' },
    ];
    form.desk.ask = () =>
      Promise.reject(new EstimatesError('inputs-invalid', 'x', { detail: 'Correct the entries.', fields }));
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    expect(form.text('.summary')).toBe(
      '2 entries need another look Scope of work: this scope is no longer offered must have mast',
    );
    expect(form.text('.error')).toBe('Scope of work: this scope is no longer offered');
    expect(form.text('.failure')).toContain('Correct the entries.');
    expect(form.events.map(({ type, detail }) => [type, detail.code])).toEqual([['tarebeam-error', 'inputs-invalid']]);
  });

  it('keeps what was typed when the desk does not answer', async () => {
    form.desk.ask = () => Promise.reject(new EstimatesError('unreachable', 'No answer.'));
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    expect(form.text('.failure')).toContain('did not answer');
    expect(form.labelled('Displacement').value).toBe('9.8 t');
    form.desk.ask = () => Promise.resolve(estimateExample());
    await form.press('Estimate');
    expect(form.text('.value')).toBe('512 hours');
  });

  it('waits as long as the desk says before it asks again', async () => {
    form.desk.ask = () =>
      Promise.reject(new EstimatesError('rate-exceeded', 'x', { detail: 'Wait.', retryAfterSeconds: 1 }));
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
    await form.press('Ask again in 1 s');
    expect(form.desk.asked).toHaveLength(1);
    await new Promise((resolve) => setTimeout(resolve, 1100));
    await form.press('Estimate');
    expect(form.desk.asked).toHaveLength(2);
  });
});
