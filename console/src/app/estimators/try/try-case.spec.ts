import { choose, field, find, maybe, pageText, saidBeside, tableTexts, type } from '../testing/page';
import { evaluation, inputSchema } from '../testing/refit-labour';
import { show, type Screen } from '../testing/screen';
import { TryCase } from './try-case';

const url = '/api/editions/edition00004/try';

function opened(): Promise<Screen<TryCase>> {
  return show(TryCase, { editionId: 'edition00004', inputSchema });
}

describe('trying a case', () => {
  it('starts from the typical case and says what the records cover', async () => {
    await opened();
    expect(field<HTMLInputElement>('Length overall').value).toBe('11.2');
    expect(field<HTMLSelectElement>('Hull material').value).toBe('GRP');
    expect(saidBeside('Length overall')).toContain('Recorded 6.1 to 18.4 m.');
  });

  it('sends what was typed and shows value, interval in words, flags and cautions with honest digits', async () => {
    const screen = await opened();
    type('Displacement', '26');
    choose('Hull material', 'steel');
    await screen.press(find('button', 'Work out the estimate'));
    const request = await screen.answer(url, evaluation, 'POST');
    expect(request.request.body).toEqual({ inputs: { length: 11.2, displacement: 26, hull: 'steel' } });
    expect(pageText()).toContain('512 hours');
    expect(pageText()).toContain('nine of ten such cases come to between 440 and 590 h');
    expect(pageText()).toContain('Displacement 26 t lies above the recorded 24 t.');
    expect(pageText()).toContain('An estimate is not a quotation.');
    expect(pageText()).not.toContain('512.3');
  });

  it('sets the beam and its table side by side, with this case’s readings', async () => {
    const screen = await opened();
    await screen.press(find('button', 'Work out the estimate'));
    await screen.answer(url, evaluation, 'POST');
    expect(maybe('image', /^Beam diagram/)).toBeDefined();
    const rows = tableTexts(find('table', /What moved the estimate/));
    expect(rows[1][0]).toBe('Displacement');
    expect(rows[1][1]).toBe('7.1 t');
  });

  it('says beside the field what cannot be read, and asks nothing', async () => {
    const screen = await opened();
    type('Length overall', 'long');
    await screen.press(find('button', 'Work out the estimate'));
    expect(saidBeside('Length overall')).toContain('“long” is not a number');
    screen.verify();
  });

  it('shows the service’s complaint beside its field and keeps what was typed', async () => {
    const screen = await opened();
    type('Length overall', '99');
    await screen.press(find('button', 'Work out the estimate'));
    await screen.refuse(
      url,
      {
        title: 'The inputs are not right',
        code: 'inputs-invalid',
        status: 422,
        errors: [{ pointer: '#/inputs/length', detail: 'Give a length below 40 m.' }],
      },
      'POST',
    );
    expect(saidBeside('Length overall')).toContain('Give a length below 40 m.');
    expect(field<HTMLInputElement>('Length overall').value).toBe('99');
    expect(find('alert', /The inputs are not right/).textContent).toContain('Give a length below 40 m.');
  });

  it('takes another level where the edition does, and suggests the recorded ones', async () => {
    const rig = {
      title: 'Rig',
      anyOf: [
        { type: 'string', enum: ['sloop', 'ketch'] },
        { type: 'string', minLength: 1 },
      ],
    };
    const screen = await show(TryCase, {
      editionId: 'edition00004',
      inputSchema: { properties: { rig }, required: ['rig'] },
    });
    type('Rig', 'yawl');
    await screen.settle();
    const list = document.getElementById(field('Rig').getAttribute('list')!);
    expect([...list!.querySelectorAll('option')].map((option) => option.value)).toEqual(['sloop', 'ketch']);
    await screen.press(find('button', 'Work out the estimate'));
    const request = await screen.answer(url, evaluation, 'POST');
    expect(request.request.body).toEqual({ inputs: { rig: 'yawl' } });
  });

  it('goes back to the typical case', async () => {
    const screen = await opened();
    type('Length overall', '18');
    await screen.settle();
    await screen.press(find('button', 'Start from the typical case'));
    expect(field<HTMLInputElement>('Length overall').value).toBe('11.2');
  });
});
