import { FormOnPage } from './testing/form-on-page';

let form: FormOnPage;
beforeEach(() => (form = new FormOnPage()));
afterEach(() => form.leave());

describe('EstimateForm, on the page around', () => {
  it('reads and writes numbers in the language of the page unless it is told another', async () => {
    document.documentElement.lang = 'de-DE';
    await form.open({ locale: null });
    await form.fillIn();
    await form.enter('Displacement', '9,812');
    await form.press('Estimate');
    expect(form.desk.asked[0].inputs['displacement']).toBe(9.812);
    document.documentElement.lang = '';
  });
});

describe('EstimateForm, taking the answer along', () => {
  afterEach(() => Reflect.deleteProperty(navigator, 'clipboard'));

  async function answer(): Promise<void> {
    await form.open();
    await form.fillIn();
    await form.press('Estimate');
  }

  it('copies the answer as text', async () => {
    const copied: string[] = [];
    const writeText = (copy: string): Promise<void> => Promise.resolve(void copied.push(copy));
    Object.defineProperty(navigator, 'clipboard', { value: { writeText }, configurable: true });
    await answer();
    await form.press('Copy as text');
    expect(copied[0]).toContain('Refit labour: 512 hours');
    expect(copied[0]).toContain('Edition 4, reference e5k2m8q1');
    expect(form.text('.said')).toBe('Copied.');
  });

  it('shows the text to be copied by hand where the browser refuses', async () => {
    await answer();
    await form.press('Copy as text');
    expect(form.root().querySelector('textarea')?.value).toContain('Refit labour: 512 hours');
  });
});
