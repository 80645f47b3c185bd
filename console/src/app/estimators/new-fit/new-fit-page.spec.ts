import { choose, field, find, maybe, pageText, saidBeside, type } from '../testing/page';
import { estimator, revision } from '../testing/refit-labour';
import { Screen, show } from '../testing/screen';
import { NewFitPage } from './new-fit-page';

const summary = { ...revision, columns: undefined, reading: undefined };
const recordSet = {
  id: 'recordset001',
  name: 'Refit jobs',
  description: '',
  createdAt: revision.createdAt,
  createdBy: revision.createdBy,
  revision: summary,
  revisionCount: 1,
};

async function opened(): Promise<Screen<NewFitPage>> {
  const screen = await show(NewFitPage, { slug: 'refit-labour' });
  await screen.answer('/api/estimators/refit-labour', estimator);
  await screen.answer('/api/record-sets', { items: [recordSet], total: 1 });
  return screen;
}

/** With the records chosen and their columns read. */
async function ready(): Promise<Screen<NewFitPage>> {
  const screen = await opened();
  choose('Record set', recordSet.id);
  await screen.settle();
  await screen.answer(`/api/record-sets/${recordSet.id}`, { ...recordSet, revisions: [summary] });
  await screen.answer(`/api/record-revisions/${revision.id}`, revision);
  return screen;
}

describe('the new fit page', () => {
  it('says that it reads the record sets', async () => {
    await show(NewFitPage, { slug: 'refit-labour' });
    expect(pageText()).toContain('Reading record sets');
  });

  it('sends to the records when there are none', async () => {
    const screen = await show(NewFitPage, { slug: 'refit-labour' });
    await screen.answer('/api/estimators/refit-labour', estimator);
    await screen.answer('/api/record-sets', { items: [], total: 0 });
    expect(find('link', 'Go to records').getAttribute('href')).toBe('/records');
  });

  it('says what went wrong and tries again', async () => {
    const screen = await show(NewFitPage, { slug: 'refit-labour' });
    await screen.answer('/api/estimators/refit-labour', estimator);
    await screen.refuse('/api/record-sets', {
      title: 'The desk is being looked after',
      status: 503,
      code: 'unavailable',
    });
    expect(find('alert', /being looked after/).textContent).toContain('being looked after');
    await screen.press(find('button', 'Try again'));
    await screen.answer('/api/record-sets', { items: [recordSet], total: 1 });
    expect(field('Record set').tagName).toBe('SELECT');
  });

  it('takes the records along that a person came from', async () => {
    const screen = await show(NewFitPage, {
      slug: 'refit-labour',
      fromSet: recordSet.id,
      fromRevision: revision.id,
    });
    await screen.answer('/api/estimators/refit-labour', estimator);
    await screen.answer('/api/record-sets', { items: [recordSet], total: 1 });
    await screen.answer(`/api/record-sets/${recordSet.id}`, { ...recordSet, revisions: [summary] });
    await screen.answer(`/api/record-revisions/${revision.id}`, revision);
    expect(field('Record set').value).toBe(recordSet.id);
    expect(field('Target').tagName).toBe('SELECT');
  });

  it('takes the newest revision and starts with one choice: the target', async () => {
    const screen = await ready();
    choose('Target', 'hours');
    await screen.settle();
    await screen.press(find('button', 'Start the fit'));
    const request = await screen.answer(
      '/api/estimators/refit-labour/fits',
      { id: 'fit000000008', state: 'queued' },
      'POST',
    );
    expect(request.request.body).toMatchObject({
      revisionId: revision.id,
      specification: { target: { column: 'hours' }, method: 'ridge' },
    });
    expect(screen.url).toBe('/estimators/refit-labour/fits/fit000000008');
  });

  it('says beside the field what is missing, and asks nothing of the service', async () => {
    const screen = await ready();
    await screen.press(find('button', 'Start the fit'));
    expect(saidBeside('Target')).toContain('Choose what to estimate.');
    expect(field('Target').getAttribute('aria-invalid')).toBe('true');
    screen.verify();
  });

  it('shows the service’s complaints beside their fields and loses nothing that was typed', async () => {
    const screen = await ready();
    choose('Target', 'hours');
    type('Folds', '12');
    await screen.settle();
    await screen.press(find('button', 'Start the fit'));
    await screen.refuse(
      '/api/estimators/refit-labour/fits',
      {
        title: 'The specification cannot be fitted',
        code: 'specification-invalid',
        status: 422,
        errors: [
          { pointer: '#/specification/validation/folds', detail: 'There are only nine yards.' },
          { pointer: '#/specification/inputs/1/transform', detail: 'Displacement has zeros.' },
        ],
      },
      'POST',
    );
    expect(saidBeside('Folds')).toContain('There are only nine yards.');
    expect(field<HTMLInputElement>('Folds').value).toBe('12');
    expect(field<HTMLSelectElement>('Target').value).toBe('hours');
    expect(field('Use displacement').closest('tr')?.textContent).toContain('Displacement has zeros.');
    expect(maybe('button', 'Start the fit')).toBeDefined();
  });

  it('keeps the draft when the page is left and entered again', async () => {
    const screen = await ready();
    choose('Target', 'hours');
    await screen.settle();
    screen.leave();
    const second = new Screen(NewFitPage, { slug: 'refit-labour' });
    await second.settle();
    await second.answer('/api/estimators/refit-labour', estimator);
    await second.answer('/api/record-sets', { items: [recordSet], total: 1 });
    await second.answer(`/api/record-sets/${recordSet.id}`, { ...recordSet, revisions: [summary] });
    await second.answer(`/api/record-revisions/${revision.id}`, revision);
    expect(field<HTMLSelectElement>('Target').value).toBe('hours');
  });

  it('offers only what goes together: no rule for least squares, a mixing for elastic net, γ for a prior', async () => {
    const screen = await ready();
    field('Least squares').click();
    await screen.settle();
    expect(maybe('group', /^Penalty chosen by/)).toBeUndefined();
    field('Elastic net').click();
    await screen.settle();
    expect(field<HTMLInputElement>('Mixing α').value).toBe('0.5');
    field('Ridge').click();
    await screen.settle();
    field('Stated prior').click();
    await screen.settle();
    expect(saidBeside('Prior standard deviation γ')).toContain('one standard deviation of an input');
  });

  it('keeps to some of the records', async () => {
    const screen = await ready();
    choose('Target', 'hours');
    choose('Records to use', 'hull');
    await screen.settle();
    await screen.press(find('button', 'Start the fit'));
    expect(pageText()).toContain('Tick what hull may be, or use all records.');
    field('steel').click();
    await screen.settle();
    await screen.press(find('button', 'Start the fit'));
    const request = await screen.answer(
      '/api/estimators/refit-labour/fits',
      { id: 'fit000000008', state: 'queued' },
      'POST',
    );
    expect(request.request.body).toMatchObject({ specification: { rowFilter: { column: 'hull', equals: ['steel'] } } });
  });

  it('lets an input be left out, read otherwise, and named', async () => {
    const screen = await ready();
    choose('Target', 'hours');
    await screen.settle();
    field('Use yard').click();
    choose('Transform of length', 'log');
    await screen.settle();
    await screen.press(find('button', 'More about length'));
    type('Label on the form', 'Length overall');
    await screen.settle();
    await screen.press(find('button', 'Start the fit'));
    const request = await screen.answer(
      '/api/estimators/refit-labour/fits',
      { id: 'fit000000008', state: 'queued' },
      'POST',
    );
    const inputs = (request.request.body as { specification: { inputs: { column: string }[] } }).specification.inputs;
    expect(inputs.map((input) => input.column)).toEqual(['length', 'displacement', 'hull']);
    expect(inputs[0]).toMatchObject({ transform: 'log', label: 'Length overall' });
  });
});
