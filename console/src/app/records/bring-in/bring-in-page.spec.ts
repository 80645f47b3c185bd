import { HttpEventType } from '@angular/common/http';
import { RecordsScreen } from '../testing/records-screen';
import { INCOMING } from './testing/incoming';

const PATH = '/api/incoming-files';
const FILE = new File(['length;hours\n12,2;300\n'], 'refits_nine-yards.csv');

describe('BringInPage', () => {
  let screen: RecordsScreen;

  beforeEach(async () => {
    screen = await RecordsScreen.open('/records/bring-in', 'analyst');
  });

  afterEach(() => screen.http.verify());

  it('sends a dropped file and goes on to how it would be read', async () => {
    await screen.drop(FILE);
    expect(screen.text).toContain('refits_nine-yards.csv');
    await screen.submit();
    const call = screen.call(PATH);
    expect((call.request.body as FormData).get('file')).toBe(FILE);
    call.flush(INCOMING);
    await screen.stable();
    expect(screen.address).toBe('/records/bring-in/incoming1');
    screen.call(`${PATH}/incoming1`);
  });

  it('asks for the file before it sends anything', async () => {
    await screen.submit();
    expect(screen.text).toContain('Choose the file that holds the records');
    expect(document.activeElement?.getAttribute('type')).toBe('file');
  });

  it.each([
    [new File([], 'empty.csv'), 'This file is empty'],
    [new File(['x'], 'refits.xls'), 'save it as .xlsx or as CSV'],
    [new File(['x'], 'refits.ods'), 'save it as .xlsx or as CSV'],
    [new File(['x'], 'refits.numbers'), 'save it as .xlsx or as CSV'],
  ])('says at once what is wrong with a file that cannot work', async (file, complaint) => {
    await screen.drop(file);
    await screen.submit();
    expect(screen.text).toContain(complaint);
  });

  it.each(['refits.xlsx', 'refits.csv.gz', 'refits'])('sends %s', async (name) => {
    await screen.drop(new File(['x'], name));
    await screen.submit();
    screen.call(PATH);
  });

  it('counts the bytes that are away, then says that the desk is looking at the file', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const call = screen.call(PATH);
    call.event({ type: HttpEventType.UploadProgress, loaded: 500_000, total: 2_000_000 });
    await screen.stable();
    expect(screen.text).toContain('500 kB of 2 MB, 25%');
    call.event({ type: HttpEventType.UploadProgress, loaded: 2_000_000, total: 2_000_000 });
    await screen.stable();
    expect(screen.page.querySelector('[role="status"]')?.textContent).toContain('looking at the first rows');
  });

  it('stops when the person cancels, and keeps the file at hand', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const call = screen.call(PATH);
    await screen.press('Cancel the upload');
    expect(call.cancelled).toBe(true);
    expect(screen.text).toContain('refits_nine-yards.csv');
  });

  it('says what the service found wrong with the file and what to do about it', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const detail = 'Save the workbook without its password, then send it again.';
    await screen.refuse(PATH, 422, { code: 'file-protected', title: 'The file is protected by a password', detail });
    const notice = screen.page.querySelector('[role="alert"]')?.textContent;
    expect(notice).toContain('The file is protected by a password');
    expect(notice).toContain(detail);
  });
});
