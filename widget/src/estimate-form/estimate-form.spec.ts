import { ComponentFixture, TestBed } from '@angular/core/testing';
import { CLIENT_FOR } from '../api/client-for';
import type { Inputs, PublishedEstimator } from '../api/contract';
import { Connection } from '../api/estimates-client';
import { EstimatesError } from '../api/estimates-error';
import { estimateExample, estimatorExample } from '../api/examples.fixture';
import { EstimateForm } from './estimate-form';

type Reply<T> = () => Promise<T>;

interface Desk {
  describe: Reply<PublishedEstimator>;
  ask: Reply<ReturnType<typeof estimateExample>>;
  readonly described: { connection: Connection; slug: string }[];
  readonly asked: { connection: Connection; slug: string; inputs: Inputs }[];
}

/** Stands for the desk on the other side of the network. */
function makeDesk(): Desk {
  return {
    describe: () => Promise.resolve(estimatorExample()),
    ask: () => Promise.resolve(estimateExample()),
    described: [],
    asked: [],
  };
}

let desk: Desk;
let fixture: ComponentFixture<EstimateForm>;
let events: CustomEvent[];

function root(): ShadowRoot {
  const { shadowRoot } = fixture.nativeElement as HTMLElement;
  if (!shadowRoot) {
    throw new Error('the form has no shadow root');
  }
  return shadowRoot;
}

function text(selector: string): string {
  return (root().querySelector(selector)?.textContent ?? '').replace(/[\s\u00a0\u202f]+/g, ' ').trim();
}

function labelled(label: string): HTMLInputElement | HTMLSelectElement {
  const found = [...root().querySelectorAll('label')].find((each) => (each.textContent ?? '').trim().startsWith(label));
  const control = found?.htmlFor ? root().getElementById(found.htmlFor) : found?.querySelector('input');
  if (control instanceof HTMLInputElement || control instanceof HTMLSelectElement) {
    return control;
  }
  throw new Error(`no field ${label}`);
}

async function enter(label: string, value: string): Promise<void> {
  const control = labelled(label);
  control.value = value;
  control.dispatchEvent(new Event('input', { bubbles: true }));
  control.dispatchEvent(new Event('change', { bubbles: true }));
  await fixture.whenStable();
}

async function choose(label: string): Promise<void> {
  labelled(label).click();
  await fixture.whenStable();
}

async function press(name: string): Promise<void> {
  const button = [...root().querySelectorAll('button')].find((each) => each.textContent?.trim() === name);
  if (!button) {
    throw new Error(`no button ${name}`);
  }
  button.click();
  await settle();
}

async function settle(): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve));
  await fixture.whenStable();
}

async function open(attributes: Record<string, unknown> = {}): Promise<void> {
  TestBed.configureTestingModule({
    providers: [
      {
        provide: CLIENT_FOR,
        useValue: (connection: Connection) => ({
          describe: (slug: string) => (desk.described.push({ connection, slug }), desk.describe()),
          ask: (slug: string, inputs: Inputs) => (desk.asked.push({ connection, slug, inputs }), desk.ask()),
        }),
      },
    ],
  });
  fixture = TestBed.createComponent(EstimateForm);
  const host = fixture.nativeElement as HTMLElement;
  document.body.append(host);
  for (const name of ['tarebeam-estimate', 'tarebeam-error']) {
    host.addEventListener(name, (event) => events.push(event as CustomEvent));
  }
  const given = {
    estimator: 'refit-labour',
    key: 'tb_key',
    service: 'https://desk.example',
    locale: 'en-GB',
    ...attributes,
  };
  for (const [name, value] of Object.entries(given)) {
    fixture.componentRef.setInput(name, value);
  }
  await settle();
}

async function fillIn(): Promise<void> {
  await enter('Length overall', '12.6');
  await enter('Displacement', '9.8 t');
  await choose('steel');
  await enter('Scope of work', 'deck');
}

beforeEach(() => {
  desk = makeDesk();
  events = [];
});
afterEach(() => document.body.replaceChildren());

describe('EstimateForm, while it loads', () => {
  it('says that it is loading, before and after it has asked', async () => {
    desk.describe = () => new Promise(() => undefined);
    await open();
    expect(text('[role=status]')).toBe('Loading the form.');
    expect(desk.described).toEqual([{ connection: expect.objectContaining({ key: 'tb_key' }), slug: 'refit-labour' }]);
  });

  it('asks nothing and says what is missing without its attributes', async () => {
    await open({ key: '' });
    expect(desk.described).toHaveLength(0);
    expect(text('.failure')).toContain('The element needs the attribute “key”.');
  });

  it('shows a failure, and tries again when asked to', async () => {
    desk.describe = () => Promise.reject(new EstimatesError('unreachable', 'No answer.'));
    await open();
    expect(text('.failure')).toContain('The estimating desk did not answer');
    expect(text('[role=status]')).toContain('The estimating desk did not answer');
    desk.describe = () => Promise.resolve(estimatorExample());
    await press('Try again');
    expect(text('.heading')).toBe('Refit labour');
  });

  it('dispatches a failure only when a person asked for it', async () => {
    desk.describe = () => Promise.reject(new EstimatesError('unavailable', 'Not now.'));
    await open();
    expect(events).toHaveLength(0);
    await press('Try again');
    expect(events.map(({ type, detail }) => [type, detail.code])).toEqual([['tarebeam-error', 'unavailable']]);
  });

  it('says so when no edition is in force', async () => {
    desk.describe = () =>
      Promise.reject(new EstimatesError('nothing-in-force', 'x', { detail: 'No edition is in force; ask the desk.' }));
    await open();
    expect(text('.failure-heading')).toBe('No estimate is offered at present');
    expect(text('.failure')).toContain('No edition is in force; ask the desk.');
  });

  it('needs no entries where the estimator has no inputs', async () => {
    desk.describe = () => Promise.resolve({ ...estimatorExample(), inputs: { type: 'object', properties: {} } });
    await open();
    expect(text('form')).toContain('This estimate needs no entries.');
    await press('Estimate');
    expect(desk.asked[0].inputs).toEqual({});
  });

  it('follows an attribute that is changed, and drops a late answer to the former', async () => {
    let answerLate: (estimator: PublishedEstimator) => void = () => undefined;
    desk.describe = () => new Promise((resolve) => (answerLate = resolve));
    await open();
    desk.describe = () => Promise.resolve({ ...estimatorExample(), name: 'Crane time' });
    fixture.componentRef.setInput('estimator', 'crane-time');
    await settle();
    answerLate(estimatorExample());
    await settle();
    expect(text('.heading')).toBe('Crane time');
  });
});

describe('EstimateForm, ready', () => {
  it("labels every field, in the estimator's order, with unit and hint", async () => {
    await open();
    const length = labelled('Length overall');
    expect(length.getAttribute('inputmode')).toBe('decimal');
    expect(root().querySelector(`label[for=${length.id}]`)?.textContent?.replace(/\s+/g, ' ').trim()).toBe(
      'Length overall (in metres)',
    );
    const described = (length.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => root().getElementById(id)?.textContent);
    expect(described.join(' ').replace(/\u00a0/g, ' ')).toBe(
      'From stem to stern, without fittings. The records run from 6.2 to 18.4 m.',
    );
    expect([...root().querySelectorAll('legend')].map((legend) => legend.textContent?.trim())).toEqual([
      'Hull material',
      expect.stringContaining('Winter booking'),
    ]);
    expect(labelled('Scope of work')).toBeInstanceOf(HTMLSelectElement);
    expect(labelled('Booked').type).toBe('date');
  });

  it('takes its heading from the attribute, or has none when that is empty', async () => {
    await open({ heading: 'Hours in the yard', headingLevel: '4' });
    expect(root().querySelector('.heading')?.getAttribute('aria-level')).toBe('4');
    expect(text('.heading')).toBe('Hours in the yard');
    fixture.componentRef.setInput('heading', '');
    await fixture.whenStable();
    expect(root().querySelector('.heading')).toBeNull();
  });

  it('remarks on a value outside the records without holding anything up', async () => {
    await open();
    await fillIn();
    await enter('Displacement', '30');
    expect(text('.notice')).toBe('30 t lies outside the records; the estimate will be marked.');
    await press('Estimate');
    expect(desk.asked).toHaveLength(1);
  });

  it('lists what is wrong with links, says the same beside the fields, focuses the list and keeps what was typed', async () => {
    await open();
    await enter('Displacement', 'heavy');
    await press('Estimate');
    const list = [...root().querySelectorAll('.summary a')].map((link) => link.textContent?.trim());
    const beside = [...root().querySelectorAll('.error')].map((error) => error.textContent?.trim());
    expect(list).toHaveLength(4);
    expect(beside).toEqual(list);
    expect(root().activeElement).toBe(root().querySelector('.summary'));
    expect(labelled('Displacement').value).toBe('heavy');
    expect(labelled('Displacement').getAttribute('aria-invalid')).toBe('true');
    expect(desk.asked).toHaveLength(0);
    expect(events).toHaveLength(0);
  });

  it('goes to the field of a link and leaves the address of the page alone', async () => {
    await open();
    await press('Estimate');
    const before = location.href;
    const link = [...root().querySelectorAll<HTMLElement>('.summary a')].find((each) =>
      each.textContent?.includes('Scope'),
    );
    link?.click();
    expect(root().activeElement).toBe(labelled('Scope of work'));
    expect(location.href).toBe(before);
  });
});

describe('EstimateForm, asking', () => {
  it('sends the case and shows the whole answer', async () => {
    await open();
    await fillIn();
    await press('Estimate');
    expect(desk.asked[0]).toMatchObject({
      slug: 'refit-labour',
      inputs: { length_overall: 12.6, displacement: 9.8, hull: 'steel', scope: 'deck' },
      connection: { key: 'tb_key', service: 'https://desk.example' },
    });
    expect(text('.value')).toBe('512 hours');
    expect(text('.interval')).toBe('Nine of ten such cases come to between 440 and 590 hours.');
    expect(text('.flags')).toContain('Displacement 30 t lies outside the records.');
    expect(text('.cautions')).toBe('An estimate is not a quotation.');
    expect(text('.reference')).toBe('Edition 4, reference e5k2m8q1, 1 December 2026');
    expect(root().querySelector('tb-beam-diagram svg')).not.toBeNull();
    expect(text('[role=status]')).toContain('The estimate is 512 hours.');
  });

  it('dispatches the estimate with the case, once', async () => {
    await open();
    await fillIn();
    await press('Estimate');
    expect(events.map(({ type }) => type)).toEqual(['tarebeam-estimate']);
    expect(events[0].detail).toEqual({ estimate: estimateExample(), inputs: desk.asked[0].inputs });
  });

  it('leaves out the beam where the page does not want it', async () => {
    await open({ showBeam: 'no' });
    await fillIn();
    await press('Estimate');
    expect(text('.value')).toBe('512 hours');
    expect(root().querySelector('tb-beam-diagram')).toBeNull();
  });

  it('says that an answer no longer belongs to the entries once they are changed', async () => {
    await open();
    await fillIn();
    await press('Estimate');
    expect(text('.result')).not.toContain('have been changed');
    await enter('Displacement', '12');
    expect(text('.result')).toContain('The entries have been changed since.');
  });

  it('does not ask twice at once', async () => {
    desk.ask = () => new Promise(() => undefined);
    await open();
    await fillIn();
    await press('Estimate');
    await press('Asking…');
    expect(desk.asked).toHaveLength(1);
  });

  it("puts the desk's problems beside their fields and dispatches the failure", async () => {
    const fields = [
      { input: 'scope', detail: 'this scope is no longer offered' },
      { input: null, detail: 'must have mast' },
    ];
    desk.ask = () =>
      Promise.reject(new EstimatesError('inputs-invalid', 'x', { detail: 'Correct the entries.', fields }));
    await open();
    await fillIn();
    await press('Estimate');
    expect(text('.summary')).toBe(
      '2 entries need another look Scope of work: this scope is no longer offered must have mast',
    );
    expect(text('.error')).toBe('Scope of work: this scope is no longer offered');
    expect(text('.failure')).toContain('Correct the entries.');
    expect(events.map(({ type, detail }) => [type, detail.code])).toEqual([['tarebeam-error', 'inputs-invalid']]);
  });

  it('keeps what was typed when the desk does not answer', async () => {
    desk.ask = () => Promise.reject(new EstimatesError('unreachable', 'No answer.'));
    await open();
    await fillIn();
    await press('Estimate');
    expect(text('.failure')).toContain('did not answer');
    expect(labelled('Displacement').value).toBe('9.8 t');
    desk.ask = () => Promise.resolve(estimateExample());
    await press('Estimate');
    expect(text('.value')).toBe('512 hours');
  });

  it('waits as long as the desk says before it asks again', async () => {
    desk.ask = () =>
      Promise.reject(new EstimatesError('rate-exceeded', 'x', { detail: 'Wait.', retryAfterSeconds: 1 }));
    await open();
    await fillIn();
    await press('Estimate');
    await press('Ask again in 1 s');
    expect(desk.asked).toHaveLength(1);
    await new Promise((resolve) => setTimeout(resolve, 1100));
    await press('Estimate');
    expect(desk.asked).toHaveLength(2);
  });
});

describe('EstimateForm, on the page around', () => {
  it('reads and writes numbers in the language of the page unless it is told another', async () => {
    document.documentElement.lang = 'de-DE';
    await open({ locale: null });
    await fillIn();
    await enter('Displacement', '9,812');
    await press('Estimate');
    expect(desk.asked[0].inputs['displacement']).toBe(9.812);
    document.documentElement.lang = '';
  });
});

describe('EstimateForm, taking the answer along', () => {
  afterEach(() => Reflect.deleteProperty(navigator, 'clipboard'));

  async function answer(): Promise<void> {
    await open();
    await fillIn();
    await press('Estimate');
  }

  it('copies the answer as text', async () => {
    const copied: string[] = [];
    const writeText = (copy: string): Promise<void> => Promise.resolve(void copied.push(copy));
    Object.defineProperty(navigator, 'clipboard', { value: { writeText }, configurable: true });
    await answer();
    await press('Copy as text');
    expect(copied[0]).toContain('Refit labour: 512 hours');
    expect(copied[0]).toContain('Edition 4, reference e5k2m8q1');
    expect(text('.said')).toBe('Copied.');
  });

  it('shows the text to be copied by hand where the browser refuses', async () => {
    await answer();
    await press('Copy as text');
    expect(root().querySelector('textarea')?.value).toContain('Refit labour: 512 hours');
  });
});
