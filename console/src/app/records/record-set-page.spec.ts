import { RecordsScreen } from './testing/records-screen';
import { RECORD_SET, REVISION } from './testing/refits';

const PATH = '/api/record-sets/records1';

describe('RecordSetPage', () => {
  it('says what it is reading while it waits', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'viewer');
    expect(screen.text).toContain('Reading the record set');
    screen.call(PATH);
  });

  it('says what to do when there is no such set', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'viewer');
    await screen.refuse(PATH, 404, { code: 'not-found', detail: 'It may have been removed.' });
    expect(screen.page.querySelector('[role="alert"]')?.textContent).toContain('It may have been removed.');
  });

  it('lists the revisions, newest first', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'viewer');
    await screen.answer(PATH, RECORD_SET);
    expect(screen.column(0)).toEqual(['Revision 2', 'Revision 1']);
    expect(screen.text).toContain('One row a finished job.');
    expect(screen.text).not.toContain('Bring in a newer file');
  });

  it('brings in a newer file and shows its revision', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'analyst');
    await screen.answer(PATH, RECORD_SET);
    await screen.drop(new File(['a;b\n1;2\n'], 'newer.csv'));
    await screen.submit();
    const call = await screen.answer(`${PATH}/revisions`, { ...REVISION, id: 'revision3', number: 3 });
    expect([...(call.request.body as FormData).keys()]).toEqual(['file']);
    expect(screen.address).toBe('/records/revisions/revision3');
    screen.call('/api/record-revisions/revision3');
  });

  it('asks for the file before it sends anything', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'analyst');
    await screen.answer(PATH, RECORD_SET);
    await screen.submit();
    expect(screen.text).toContain('Choose the file that holds the records');
    screen.http.verify();
  });
});
