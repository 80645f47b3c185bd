import { controlOf } from '../../ui/testing/queries';
import { RecordsScreen } from '../testing/records-screen';
import { RECORD_SET, revisionSummary } from '../testing/refits';
import { INCOMING } from './testing/incoming';

const SET_PATH = '/api/record-sets/records1';
const FILE = new File(['a;b\n1;2\n'], 'newer.csv');
const MENDED = { ...revisionSummary(3), origin: 'mended' as const };

describe('NewerFile', () => {
  async function open(revisions = RECORD_SET.revisions): Promise<RecordsScreen> {
    const screen = await RecordsScreen.open('/records/records1', 'analyst');
    const revision = { ...RECORD_SET.revision, number: revisions.length };
    await screen.answer(SET_PATH, { ...RECORD_SET, lastNumber: revision.number, revision, revisions });
    return screen;
  }

  const section = ({ page }: RecordsScreen): HTMLElement => page.querySelector('tb-newer-file') as HTMLElement;

  async function choose(screen: RecordsScreen, label: string): Promise<void> {
    controlOf(section(screen), label).click();
    await screen.stable();
  }

  async function send(screen: RecordsScreen): Promise<void> {
    section(screen)
      .querySelector('form')
      ?.dispatchEvent(new Event('submit', { cancelable: true }));
    await screen.stable();
  }

  it('sends a file that becomes the next revision, and goes on to how it would be read', async () => {
    const screen = await open();
    await screen.drop(FILE);
    await send(screen);
    await screen.answer('/api/incoming-files', INCOMING);
    expect(screen.address).toBe('/records/bring-in/incoming1?recordSet=records1');
  });

  it('appends to the newest revision that was brought in, not to a mended one, and says why', async () => {
    const screen = await open([...RECORD_SET.revisions, MENDED]);
    await choose(screen, 'Revision 4 by appending');
    expect(controlOf<HTMLSelectElement>(section(screen), 'Append to').value).toBe('revision2');
    expect(section(screen).textContent).toContain('A later revision was mended.');
    await screen.drop(FILE);
    await send(screen);
    await screen.answer('/api/incoming-files', INCOMING);
    expect(screen.address).toBe('/records/bring-in/incoming1?appendTo=revision2');
  });

  it('warns of appending to a mended revision', async () => {
    const screen = await open([...RECORD_SET.revisions, MENDED]);
    await choose(screen, 'Revision 4 by appending');
    const select = controlOf<HTMLSelectElement>(section(screen), 'Append to');
    select.value = 'revision3';
    select.dispatchEvent(new Event('change'));
    await screen.stable();
    expect(section(screen).textContent).toContain('Revision 3 was mended, and the new rows would not be');
  });

  it('does not offer to append to rows that were erased', async () => {
    const erased = RECORD_SET.revisions.map((revision) => ({ ...revision, erasedAt: '2026-11-01T00:00:00Z' }));
    const screen = await open(erased);
    expect(section(screen).textContent).not.toContain('appending');
  });

  it('asks for the file before it sends anything', async () => {
    const screen = await open();
    await send(screen);
    expect(section(screen).textContent).toContain('Choose the file that holds the records');
    screen.http.expectNone('/api/incoming-files');
  });
});
