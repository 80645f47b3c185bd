import { FormOnPage } from './testing/form-on-page';

let form: FormOnPage;
beforeEach(() => (form = new FormOnPage()));
afterEach(() => form.leave());

describe('EstimateForm, ready', () => {
  it("labels every field, in the estimator's order, with unit and hint", async () => {
    await form.open();
    const length = form.labelled('Length overall');
    expect(length.getAttribute('inputmode')).toBe('decimal');
    expect(form.root().querySelector(`label[for=${length.id}]`)?.textContent?.replace(/\s+/g, ' ').trim()).toBe(
      'Length overall (in metres)',
    );
    const described = (length.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => form.root().getElementById(id)?.textContent);
    expect(described.join(' ').replace(/\u00a0/g, ' ')).toBe(
      'From stem to stern, without fittings. The records run from 6.2 to 18.4 m.',
    );
    expect([...form.root().querySelectorAll('legend')].map((legend) => legend.textContent?.trim())).toEqual([
      'Hull material',
      expect.stringContaining('Winter booking'),
    ]);
    expect(form.labelled('Scope of work')).toBeInstanceOf(HTMLSelectElement);
    expect(form.labelled('Booked').type).toBe('date');
  });

  it('takes its heading from the attribute, or has none when that is empty', async () => {
    await form.open({ heading: 'Hours in the yard', headingLevel: '4' });
    expect(form.root().querySelector('.heading')?.getAttribute('aria-level')).toBe('4');
    expect(form.text('.heading')).toBe('Hours in the yard');
    form.fixture.componentRef.setInput('heading', '');
    await form.fixture.whenStable();
    expect(form.root().querySelector('.heading')).toBeNull();
  });

  it('remarks on a value outside the records without holding anything up', async () => {
    await form.open();
    await form.fillIn();
    await form.enter('Displacement', '30');
    expect(form.text('.notice')).toBe('30 t lies outside the records; the estimate will be marked.');
    await form.press('Estimate');
    expect(form.desk.asked).toHaveLength(1);
  });

  it('lists what is wrong with links, says the same beside the fields, focuses the list and keeps what was typed', async () => {
    await form.open();
    await form.enter('Displacement', 'heavy');
    await form.press('Estimate');
    const list = [...form.root().querySelectorAll('.summary a')].map((link) => link.textContent?.trim());
    const beside = [...form.root().querySelectorAll('.error')].map((error) => error.textContent?.trim());
    expect(list).toHaveLength(4);
    expect(beside).toEqual(list);
    expect(form.root().activeElement).toBe(form.root().querySelector('.summary'));
    expect(form.labelled('Displacement').value).toBe('heavy');
    expect(form.labelled('Displacement').getAttribute('aria-invalid')).toBe('true');
    expect(form.desk.asked).toHaveLength(0);
    expect(form.events).toHaveLength(0);
  });

  it('goes to the field of a link and leaves the address of the page alone', async () => {
    await form.open();
    await form.press('Estimate');
    const before = location.href;
    const link = [...form.root().querySelectorAll<HTMLElement>('.summary a')].find((each) =>
      each.textContent?.includes('Scope'),
    );
    link?.click();
    expect(form.root().activeElement).toBe(form.labelled('Scope of work'));
    expect(location.href).toBe(before);
  });
});
