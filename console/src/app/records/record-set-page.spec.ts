import { RecordsScreen } from './testing/records-screen';
import { RECORD_SET } from './testing/refits';

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

  it('lets an analyst bring in a newer file', async () => {
    const screen = await RecordsScreen.open('/records/records1', 'analyst');
    await screen.answer(PATH, RECORD_SET);
    expect(screen.text).toContain('Bring in a newer file');
  });
});
