import type { FitProgressEvent } from '../../api/contract';
import { OPEN_EVENT_SOURCE } from '../../api/event-source';
import { field, find, maybe, pageText, tableTexts, type } from '../testing/page';
import { edition, fit, result } from '../testing/refit-labour';
import { show, type Screen } from '../testing/screen';
import { FitPage } from './fit-page';

/** A stream of server-sent events in the spec's hands. */
class Stream extends EventTarget {
  readyState = 1;
  closed = false;

  readonly close = (): void => {
    this.closed = true;
  };

  tell(step: FitProgressEvent): void {
    this.dispatchEvent(new MessageEvent('progress', { data: JSON.stringify(step) }));
  }
}

async function opened(
  stream = new Stream(),
  roles: readonly ('analyst' | 'viewer')[] = ['analyst'],
): Promise<Screen<FitPage>> {
  return show(FitPage, { slug: 'refit-labour', id: fit.id }, roles, [
    { provide: OPEN_EVENT_SOURCE, useValue: () => stream },
  ]);
}

const url = `/api/fits/${fit.id}`;
const running = {
  ...fit,
  state: 'running' as const,
  progress: { stage: 'reading', done: 0, total: 0 },
  result: null,
  finishedAt: null,
};

describe('the fit page', () => {
  it('says that it reads the fit', async () => {
    await opened();
    expect(pageText()).toContain('Reading the fit');
  });

  it('says what went wrong and tries again', async () => {
    const screen = await opened();
    await screen.refuse(url, { title: 'No such fit', status: 404, code: 'not-found' });
    await screen.press(find('button', 'Try again'));
    await screen.answer(url, fit);
    expect(find('heading', /^Fit of Refit labour/)).toBeDefined();
  });

  it('follows a fit under way with its stage and count, and shows the result at its end', async () => {
    const stream = new Stream();
    const screen = await opened(stream);
    await screen.answer(url, running);
    stream.tell({ state: 'running', progress: { stage: 'validation', done: 3, total: 9 } });
    await screen.settle();
    expect(pageText()).toContain('Estimating held-out records · 3 of 9');
    expect(document.querySelector('progress')?.value).toBe(3);
    stream.tell({ state: 'done', progress: { stage: 'diagnostics', done: 1, total: 1 } });
    await screen.settle();
    expect(stream.closed).toBe(true);
    await screen.answer(url, fit);
    expect(find('heading', 'Held-out error')).toBeDefined();
    expect(document.querySelector('progress')).toBeNull();
  });

  it('cancels', async () => {
    const stream = new Stream();
    const screen = await opened(stream);
    await screen.answer(url, running);
    await screen.press(find('button', 'Cancel the fit'));
    await screen.answer(`${url}/cancel`, { id: fit.id, state: 'cancelled' }, 'POST');
    await screen.answer(url, { ...running, state: 'cancelled' });
    expect(pageText()).toContain('stopped before it found anything');
    expect(find('link', 'Start another').getAttribute('href')).toBe('/estimators/refit-labour/new-fit');
  });

  it('says why a fit failed and in which column', async () => {
    const screen = await opened();
    await screen.answer(url, {
      ...running,
      state: 'failed',
      failure: { code: 'fit-failed', message: 'A reading is missing; say what to do.', column: 'beam' },
    });
    expect(find('alert', /A reading is missing/).textContent).toContain('The column is beam');
  });

  it('shows the penalty with its equivalents and the held-out error', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    expect(tableTexts(find('table', 'The penalty and its equivalents')).map((row) => row.slice(0, 2))).toEqual([
      ['Penalty λ', '1'],
      ['Sum form λ·n', '2,391'],
      ['Effective degrees of freedom', '2.50'],
      ['Prior standard deviation γ', '0.790 h'],
    ]);
    expect(pageText()).toContain('38.7 h');
    expect(pageText()).toContain('90% where 90% were to be');
  });

  it('says what each rule would have chosen', async () => {
    const screen = await opened();
    const choices = [
      { rule: 'minimum', lambda: 0.1 },
      { rule: 'one-standard-error', lambda: 1 },
    ];
    await screen.answer(url, { ...fit, result: { ...result, penalty: { ...result.penalty, choices } } });
    expect(tableTexts(find('table', 'What each rule would choose')).slice(1)).toEqual([
      ['Minimum', '0.100', '3.35', ''],
      ['One standard error', '1', '2.50', 'chosen'],
    ]);
  });

  it('draws curve and path, and shows each as a table instead', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    expect(find('image', /^Cross-validation curve\. Chosen: λ 1/)).toBeDefined();
    expect(find('image', /^Penalty path/)).toBeDefined();
    for (const button of document.querySelectorAll<HTMLElement>('figure .head button')) await screen.press(button);
    expect(maybe('image', /^Penalty path/)).toBeUndefined();
    const curve = tableTexts(find('table', 'Held-out error along the penalty'));
    expect(curve[3]).toEqual(['1', '2.50', '38.73', '1,500', '70', 'chosen, one standard error']);
    expect(curve[4][5]).toBe('minimum');
    expect(tableTexts(find('table', 'Standardised weights at points of the path'))[1][0]).toBe('displacement');
  });

  it('changes the curve’s axis', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    await screen.press(find('button', 'by effective degrees of freedom'));
    expect(find('image', /^Cross-validation/).textContent).toContain('stronger penalty to the left');
  });

  it('groups levels under their input, with standard errors and digits that follow from them', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    expect(tableTexts(find('table', 'Weights by input'))).toEqual([
      ['Input', 'Per unit, h', 'Standard error', 'Standardised, h'],
      ['displacement', '11.42', '0.55', '33.6'],
      ['length', '9.73', '0.82', '24.1'],
      ['hull'],
      ['GRP', '−12.1', '2.1', '−5.8'],
      ['steel', '18.9', '2.4', '7.2'],
      ['Intercept at the zero of every input', '−41.24', '', ''],
    ]);
  });

  it('reads back the report, the specification and the records', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    expect(pageText()).toContain('none: solved directly');
    expect(pageText()).toContain('hull was held together with rig in 12 records.');
    expect(pageText()).toContain('Held out: 9 folds that keep each yard together, seed 1.');
    expect(pageText()).toContain('ab'.repeat(32));
  });

  it('shows diagnostics where the engine gives them', async () => {
    const screen = await opened();
    const diagnostics = {
      sharedLoad: [
        { members: [{ input: 'length' }, { input: 'waterline' }], smallestCorrelation: 0.973, ridge: [3, 4.5] },
      ],
    };
    await screen.answer(url, { ...fit, result: { ...result, diagnostics } });
    expect(tableTexts(find('table', 'Least correlation 0.973'))).toEqual([
      ['Input', 'Ridge'],
      ['length', '3'],
      ['waterline', '4.50'],
    ]);
    expect(maybe('heading', 'Records that pull the most')).toBeUndefined();
  });

  it('sets held-out estimates against records, or shows those furthest off as a table', async () => {
    const screen = await opened();
    const residuals = [
      { row: 0, recorded: 310, heldOutEstimate: 300 },
      { row: 7, recorded: 180, heldOutEstimate: 240.4 },
    ];
    await screen.answer(url, { ...fit, result: { ...result, diagnostics: { residuals } } });
    expect(find('image', /^Estimate against record\. 1 of the 2 records/)).toBeDefined();
    await screen.press(find('button', 'how far off'));
    expect(find('image', /^Estimate against record/).textContent).toContain('recorded minus estimated, h');
    await screen.press([...document.querySelectorAll<HTMLElement>('figure .head button')].at(-1)!);
    expect(tableTexts(find('table', 'Records furthest off'))[1]).toEqual(['8', '180', '240', '−60']);
  });

  it('draws up an edition with its change note and goes there', async () => {
    const screen = await opened();
    await screen.answer(url, fit);
    await screen.press(find('button', 'Draw up an edition'));
    type('Change note', 'New records to October.');
    await screen.press(find('button', 'Draw up the edition'));
    const request = await screen.answer(
      '/api/estimators/refit-labour/editions',
      { ...edition, id: 'edition00005' },
      'POST',
    );
    expect(request.request.body).toEqual({ fitId: fit.id, changeNote: 'New records to October.' });
    expect(screen.url).toBe('/estimators/refit-labour/editions/edition00005');
  });

  it('lets a viewer read and nothing else', async () => {
    const screen = await opened(new Stream(), ['viewer']);
    await screen.answer(url, fit);
    expect(maybe('button', 'Draw up an edition')).toBeUndefined();
    expect(() => field('Change note')).toThrow();
  });
});
