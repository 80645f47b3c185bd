import { field, find, maybe, pageText, saidBeside, tableTexts, type } from '../testing/page';
import { estimator } from '../testing/refit-labour';
import { show, type Screen } from '../testing/screen';
import { EstimatorsPage } from './estimators-page';

const url = '/api/estimators';
const paint = {
  ...estimator,
  slug: 'antifouling-paint',
  name: 'Antifouling paint',
  targetName: 'Paint',
  unit: 'litres',
  inForce: null,
  fitCount: 0,
  estimateCount: 0,
};

async function listed(items: readonly object[]): Promise<Screen<EstimatorsPage>> {
  const screen = await show(EstimatorsPage, {});
  await screen.answer(url, { items, total: items.length });
  return screen;
}

describe('the list of estimators', () => {
  it('says that it reads them', async () => {
    await show(EstimatorsPage, {});
    expect(pageText()).toContain('Reading the estimators');
  });

  it('says what belongs there when there is none, and offers the next step', async () => {
    const screen = await listed([]);
    expect(find('heading', 'No estimator is named yet')).toBeDefined();
    await screen.press(find('button', 'Name the first estimator'));
    expect(field('Name').getAttribute('aria-invalid')).toBeNull();
  });

  it('says what went wrong and tries again', async () => {
    const screen = await show(EstimatorsPage, {});
    await screen.refuse(url, { title: 'Not now', status: 503, code: 'unavailable' });
    await screen.press(find('button', 'Try again'));
    await screen.answer(url, { items: [estimator], total: 1 });
    expect(find('link', 'Refit labour').getAttribute('href')).toBe('/estimators/refit-labour');
  });

  it('sets out name, target and unit, edition, held-out error, fits and estimates', async () => {
    await listed([estimator, paint]);
    const rows = tableTexts(find('table', 'Estimators')).slice(1);
    expect(rows).toEqual([
      ['Antifouling paint', 'Paint, litres', 'none yet', '–', '0', '0'],
      ['Refit labour', 'Labour, h', 'In force · edition 4', '39 h', '7', '1,204'],
    ]);
  });

  it('lets a viewer name none', async () => {
    const screen = await show(EstimatorsPage, {}, ['viewer']);
    await screen.answer(url, { items: [estimator], total: 1 });
    expect(maybe('button', 'Name an estimator')).toBeUndefined();
  });
});

describe('naming an estimator', () => {
  async function naming(): Promise<Screen<EstimatorsPage>> {
    const screen = await listed([estimator]);
    await screen.press(find('button', 'Name an estimator'));
    return screen;
  }

  it('suggests the public name until one is typed', async () => {
    const screen = await naming();
    type('Name', 'Crane time');
    await screen.settle();
    expect(field<HTMLInputElement>('Public name').value).toBe('crane-time');
    type('Public name', 'crane');
    type('Name', 'Crane time, minutes');
    await screen.settle();
    expect(field<HTMLInputElement>('Public name').value).toBe('crane');
  });

  it('sends what was typed, without cautions left empty, and goes to the new sheet', async () => {
    const screen = await naming();
    type('Name', 'Crane time');
    type('What it estimates', 'Time on the crane');
    type('Unit', 'min');
    type('Caution 1', 'Not a lifting plan.');
    await screen.settle();
    await screen.press(find('button', 'Add a caution'));
    await screen.press(find('button', 'Name the estimator'));
    const request = await screen.answer(url, { ...estimator, slug: 'crane-time' }, 'POST');
    expect(request.request.body).toEqual({
      slug: 'crane-time',
      name: 'Crane time',
      targetName: 'Time on the crane',
      unit: 'min',
      description: '',
      intendedUse: '',
      notFor: '',
      cautions: ['Not a lifting plan.'],
    });
    expect(screen.url).toBe('/estimators/crane-time');
  });

  it('says beside each field what is missing, and keeps what was typed when the service refuses', async () => {
    const screen = await naming();
    await screen.press(find('button', 'Name the estimator'));
    expect(saidBeside('Name')).toContain('Enter a name');
    type('Name', 'Refit labour');
    type('What it estimates', 'Labour');
    await screen.settle();
    await screen.press(find('button', 'Name the estimator'));
    await screen.refuse(
      url,
      {
        title: 'The public name is taken',
        status: 409,
        code: 'slug-taken',
        errors: [{ pointer: '#/slug', detail: 'Choose another public name.' }],
      },
      'POST',
    );
    expect(saidBeside('Public name')).toContain('Choose another public name.');
    expect(field<HTMLInputElement>('Name').value).toBe('Refit labour');
  });

  it('takes a caution away', async () => {
    const screen = await naming();
    type('Caution 1', 'First.');
    await screen.settle();
    await screen.press(find('button', 'Add a caution'));
    type('Caution 2', 'Second.');
    await screen.settle();
    await screen.press(find('button', 'Remove caution 1'));
    expect(field<HTMLInputElement>('Caution 1').value).toBe('Second.');
  });
});
