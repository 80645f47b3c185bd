import type { Role } from '../../api/contract';
import { field, find, maybe, pageText, tableTexts, type } from '../testing/page';
import { edition, editionSummary, estimator, fitSummary } from '../testing/refit-labour';
import { show, type Screen } from '../testing/screen';
import { EstimatorPage } from './estimator-page';

const url = '/api/estimators/refit-labour';
const estimate = {
  id: 'estimate0001',
  edition: 4,
  value: 512.3781,
  low: 437.6,
  high: 588.4,
  flagCount: 1,
  issuedAt: '2026-11-20T14:05:00Z',
  partnerName: 'Northquay Moorings',
  keyLabel: 'Booking system',
};

async function opened(found: object = estimator, roles: readonly Role[] = ['analyst']): Promise<Screen<EstimatorPage>> {
  const screen = await show(EstimatorPage, { slug: 'refit-labour' }, roles);
  await screen.answer(url, found);
  return screen;
}

async function read(
  screen: Screen<EstimatorPage>,
  lists: { fits?: object[]; editions?: object[]; estimates?: object[] },
): Promise<void> {
  for (const [name, items] of Object.entries({ fits: [], editions: [], estimates: [], ...lists })) {
    await screen.answer(`${url}/${name}`, { items, total: items.length });
  }
}

describe('the estimator sheet', () => {
  it('says that it reads the estimator', async () => {
    await show(EstimatorPage, { slug: 'refit-labour' });
    expect(pageText()).toContain('Reading the estimator');
  });

  it('says what went wrong and tries again', async () => {
    const screen = await show(EstimatorPage, { slug: 'refit-labour' });
    await screen.refuse(url, { title: 'No such estimator', status: 404, code: 'estimator-unknown' });
    await screen.press(find('button', 'Try again'));
    await screen.answer(url, estimator);
    expect(find('heading', /^Refit labour, h/).textContent).toContain('In force · edition 4');
  });

  it('names the unit, the stamp, the summary and one primary action', async () => {
    await opened();
    expect(pageText()).toContain('Ridge, 3 inputs, 2,391 records · held-out error 39 h · since 3 November 2026');
    expect(find('link', 'Start a new fit').getAttribute('href')).toBe('/estimators/refit-labour/new-fit');
    expect(document.querySelectorAll('.tb-button')).toHaveLength(1);
  });

  it('leads from the margin to every section', async () => {
    await opened();
    const anchors = [...document.querySelectorAll('nav[aria-label="On this sheet"] a')].map((link) =>
      link.textContent?.trim(),
    );
    expect(anchors).toEqual(['In force', 'Try a case', 'Fits', 'Editions', 'Estimates', 'Words']);
  });

  it('tries a case on the edition in force', async () => {
    const screen = await opened();
    await screen.answer(`/api/editions/${edition.id}`, edition);
    expect(field<HTMLInputElement>('Length overall').value).toBe('11.2');
  });

  it('lists fits, editions and estimates', async () => {
    const screen = await opened();
    await read(screen, {
      fits: [fitSummary],
      editions: [{ ...editionSummary, id: 'edition00003', number: 3, state: 'superseded' }, editionSummary],
      estimates: [estimate],
    });
    expect(tableTexts(find('table', 'Fits'))[1].slice(1, 7)).toEqual([
      'Done',
      'Ridge, one standard error',
      'Refit jobs, 3',
      '3',
      '2.50',
      '38.7 h',
    ]);
    expect(
      tableTexts(find('table', 'Editions'))
        .slice(1)
        .map((row) => row.slice(0, 2)),
    ).toEqual([
      ['Edition 4', 'In force'],
      ['Edition 3', 'Superseded'],
    ]);
    expect(tableTexts(find('table', 'Newest estimates'))[1].slice(1)).toEqual([
      '512',
      '440 to 590',
      '4',
      '1',
      'Northquay Moorings',
      'Booking system',
    ]);
    expect(document.querySelector('a[href="/estimates/estimate0001"]')).not.toBeNull();
  });

  it('says what belongs into each list while it is empty', async () => {
    const screen = await opened({ ...estimator, inForce: null });
    await read(screen, {});
    for (const words of ['Nothing is in force yet', 'No fit yet.', 'No edition yet.', 'No partner has asked yet.'])
      expect(pageText()).toContain(words);
    expect(maybe('heading', 'Try a case')).toBeUndefined();
  });

  it('says what went wrong in one list and leaves the others', async () => {
    const screen = await opened();
    await screen.refuse(`${url}/fits`, { title: 'The fits cannot be read', status: 503, code: 'unavailable' });
    await screen.answer(`${url}/editions`, { items: [editionSummary], total: 1 });
    expect(find('alert', /The fits cannot be read/)).toBeDefined();
    expect(find('table', 'Editions')).toBeDefined();
  });

  it('asks for older estimates a page at a time', async () => {
    const screen = await opened();
    await screen.answer(`${url}/estimates`, { items: [estimate], total: 24 });
    await screen.press(find('button', 'Next'));
    const request = await screen.answer(`${url}/estimates`, { items: [estimate], total: 24 });
    expect(request.request.params.get('offset')).toBe('10');
  });

  it('changes its words, and never its public name', async () => {
    const screen = await opened();
    await screen.press(find('button', 'Change the words'));
    type('Not for', 'Insurance claims or lifting plans.');
    await screen.settle();
    await screen.press(find('button', 'Keep changes'));
    const request = await screen.answer(url, { ...estimator, notFor: 'Insurance claims or lifting plans.' }, 'PATCH');
    expect(request.request.body).toEqual({
      name: 'Refit labour',
      targetName: 'Labour',
      unit: 'h',
      description: estimator.description,
      intendedUse: estimator.intendedUse,
      notFor: 'Insurance claims or lifting plans.',
      cautions: estimator.cautions,
    });
    expect(pageText()).toContain('Insurance claims or lifting plans.');
    expect(maybe('button', 'Keep changes')).toBeUndefined();
  });

  it('lets a viewer change nothing', async () => {
    await opened(estimator, ['viewer']);
    expect(maybe('link', 'Start a new fit')).toBeUndefined();
    expect(maybe('button', 'Change the words')).toBeUndefined();
  });
});
