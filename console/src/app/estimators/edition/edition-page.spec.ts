import type { Edition, Role } from '../../api/contract';
import { field, find, maybe, pageText, saidBeside, tableTexts, type } from '../testing/page';
import { edition, estimator, fit, ines, tomas } from '../testing/refit-labour';
import { show, type Screen } from '../testing/screen';
import { EditionPage } from './edition-page';

const url = `/api/editions/${edition.id}`;

async function opened(
  found: Partial<Edition>,
  roles: readonly Role[] = ['analyst'],
  person = ines,
): Promise<Screen<EditionPage>> {
  const screen = await show(EditionPage, { slug: 'refit-labour', id: edition.id }, roles, [], person);
  await screen.answer(url, { ...edition, ...found });
  await screen.answer('/api/estimators/refit-labour', estimator);
  return screen;
}

/** After a change the estimator is read again, for its edition in force. */
async function took(screen: Screen<EditionPage>, path: string, found: Partial<Edition>): Promise<unknown> {
  const request = await screen.answer(`${url}/${path}`, { ...edition, ...found }, 'POST');
  await screen.answer('/api/estimators/refit-labour', estimator);
  return request.request.body;
}

describe('the edition page', () => {
  it('says that it reads the edition', async () => {
    await show(EditionPage, { slug: 'refit-labour', id: edition.id });
    expect(pageText()).toContain('Reading the edition');
  });

  it('says what went wrong and tries again', async () => {
    const screen = await show(EditionPage, { slug: 'refit-labour', id: edition.id });
    await screen.refuse(url, { title: 'No such edition', status: 404, code: 'edition-unknown' });
    await screen.press(find('button', 'Try again'));
    await screen.answer(url, edition);
    expect(find('heading', /^Refit labour, edition 4/).textContent).toContain('In force');
  });

  it('shows formula, inputs, records, checksum and who did what', async () => {
    const screen = await opened({});
    await screen.answer(`/api/fits/${fit.id}`, fit);
    expect(tableTexts(find('table', 'Terms of the formula')).slice(1)[0]).toEqual(['+9.73100', 'length']);
    expect(tableTexts(find('table', 'Inputs of the edition'))[1]).toEqual([
      'Length overall Without the bowsprit.',
      'm',
      '6.1 to 18.4',
      '11.2',
      'refused',
    ]);
    expect(tableTexts(find('table', 'Inputs of the edition'))[3][2]).toBe('GRP; steel');
    expect(tableTexts(find('table', 'Who did what'))[1].slice(1, 3)).toEqual(['In force', 'Tomas Lindqvist']);
    expect(pageText()).toContain('cd'.repeat(32));
    expect(pageText()).toContain('approved by Tomas Lindqvist');
  });

  it('lets a draft be tried before anyone relies on it', async () => {
    await opened({ state: 'draft' });
    expect(find('button', 'Work out the estimate')).toBeDefined();
  });

  it('submits a draft after naming what follows', async () => {
    const screen = await opened({ state: 'draft', submittedBy: null });
    await screen.press(find('button', 'Submit for review'));
    expect(pageText()).toContain('You cannot put it in force yourself.');
    const verb = [...document.querySelectorAll<HTMLElement>('mat-dialog-actions button')].at(-1)!;
    await screen.press(verb);
    await took(screen, 'submit', { state: 'under-review' });
    expect(find('heading', /^Refit labour, edition 4/).textContent).toContain('Under review');
  });

  it('leaves putting in force to someone else than the submitter, and says so', async () => {
    const screen = await opened({ state: 'under-review', mayPutInForce: false }, ['analyst', 'reviewer'], ines);
    const button = find('button', 'Put in force');
    expect(button.getAttribute('aria-disabled')).toBe('true');
    expect(document.getElementById(button.getAttribute('aria-describedby')!)?.textContent).toContain(
      'someone else must',
    );
    await screen.press(button);
    expect(document.querySelector('mat-dialog-container')).toBeNull();
  });

  it('puts in force after naming the edition that is superseded', async () => {
    const screen = await opened({ number: 5, state: 'under-review', mayPutInForce: true }, ['reviewer'], tomas);
    await screen.press(find('button', 'Put in force'));
    expect(pageText()).toContain('Edition 4, in force now, is superseded.');
    await screen.press([...document.querySelectorAll<HTMLElement>('mat-dialog-actions button')].at(-1)!);
    await took(screen, 'put-in-force', { number: 5, state: 'in-force' });
    expect(maybe('button', /^More/)).toBeDefined();
  });

  it('sends back with a note', async () => {
    const screen = await opened({ state: 'under-review', mayPutInForce: true }, ['reviewer'], tomas);
    await screen.press(find('button', 'Send back'));
    type('What must change', 'The seed is not ours.');
    await screen.press([...document.querySelectorAll<HTMLElement>('mat-dialog-actions button')].at(-1)!);
    expect(await took(screen, 'send-back', { state: 'draft' })).toEqual({ note: 'The seed is not ours.' });
  });

  it('withdraws with a reason and a last day', async () => {
    const screen = await opened({}, ['reviewer'], tomas);
    await screen.press(find('button', /^More/));
    await screen.press(find('button', 'Withdraw'));
    const verb = (): HTMLElement => [...document.querySelectorAll<HTMLElement>('mat-dialog-actions button')].at(-1)!;
    await screen.press(verb());
    expect(saidBeside('Why it is withdrawn')).toContain('Say why');
    type('Why it is withdrawn', 'A wrong unit.');
    type('Answer pinned calls until', '2999-12-31');
    await screen.press(verb());
    const body = await took(screen, 'withdraw', { state: 'withdrawn' });
    expect(body).toEqual({ note: 'A wrong unit.', sunsetAt: new Date('2999-12-31T23:59:59').toISOString() });
    expect(maybe('button', /^More/)).toBeUndefined();
  });

  it('shows the service’s refusal and stays as it was', async () => {
    const screen = await opened({ state: 'under-review', mayPutInForce: true }, ['reviewer'], tomas);
    await screen.press(find('button', 'Put in force'));
    await screen.press([...document.querySelectorAll<HTMLElement>('mat-dialog-actions button')].at(-1)!);
    await screen.refuse(
      `${url}/put-in-force`,
      { title: 'Someone else must approve it', status: 409, code: 'own-edition' },
      'POST',
    );
    expect(find('alert', /Someone else must approve it/)).toBeDefined();
    expect(find('heading', /^Refit labour, edition 4/).textContent).toContain('Under review');
  });

  it('offers a viewer nothing but reading', async () => {
    await opened({ state: 'under-review' }, ['viewer']);
    for (const name of ['Put in force', 'Send back', 'Submit for review', /^More/])
      expect(maybe('button', name)).toBeUndefined();
    expect(() => field('What must change')).toThrow();
  });
});
