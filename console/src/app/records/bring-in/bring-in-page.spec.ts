import { HttpEventType } from '@angular/common/http';
import { RecordsScreen } from '../testing/records-screen';
import { RECORD_SET, REVISION } from '../testing/refits';

const PATH = '/api/record-sets';
const FILE = new File(['length;hours\n12,2;300\n'], 'refits_nine-yards.csv');

describe('BringInPage', () => {
  let screen: RecordsScreen;

  beforeEach(async () => {
    screen = await RecordsScreen.open('/records/bring-in', 'analyst');
  });

  afterEach(() => screen.http.verify());

  it('takes a dropped file, suggests a name from it, and shows the revision that came of it', async () => {
    await screen.drop(FILE);
    expect(screen.control('Name').value).toBe('refits nine yards');
    await screen.submit();
    const call = screen.call(PATH);
    expect((call.request.body as FormData).get('name')).toBe('refits nine yards');
    call.flush(RECORD_SET);
    await screen.stable();
    expect(screen.address).toBe(`/records/revisions/${REVISION.id}`);
    screen.call(`/api/record-revisions/${REVISION.id}`);
  });

  it('keeps the name that was typed when another file is chosen', async () => {
    await screen.type('Name', 'Refits');
    await screen.drop(FILE);
    expect(screen.control('Name').value).toBe('Refits');
  });

  it('asks for the file and the name before it sends anything', async () => {
    await screen.submit();
    expect(screen.text).toContain('Choose the file that holds the records');
    expect(screen.text).toContain('Enter a name for the record set');
  });

  it.each([
    [new File([], 'empty.csv'), 'This file is empty'],
    [new File(['PK'], 'refits.xlsx'), 'save it as CSV'],
  ])('says at once what is wrong with a file that cannot work', async (file, complaint) => {
    await screen.drop(file);
    await screen.submit();
    expect(screen.text).toContain(complaint);
  });

  it('counts the bytes that are away, then says that the rows are being read', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const call = screen.call(PATH);
    call.event({ type: HttpEventType.UploadProgress, loaded: 500_000, total: 2_000_000 });
    await screen.stable();
    expect(screen.text).toContain('500 kB of 2 MB, 25%');
    call.event({ type: HttpEventType.UploadProgress, loaded: 2_000_000, total: 2_000_000 });
    await screen.stable();
    expect(screen.page.querySelector('[role="status"]')?.textContent).toContain('reading the rows');
  });

  it('stops when the person cancels, and keeps what was entered', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const call = screen.call(PATH);
    await screen.press('Cancel the upload');
    expect(call.cancelled).toBe(true);
    expect(screen.text).toContain('refits_nine-yards.csv');
    expect(screen.control('Name').value).toBe('refits nine yards');
  });

  it('names the line of the file and what to do about it', async () => {
    await screen.drop(FILE);
    await screen.submit();
    await screen.refuse(PATH, 422, {
      code: 'file-ragged',
      detail: 'Put values that hold a comma into quotes.',
      line: 48,
    });
    const notice = screen.page.querySelector('[role="alert"]')?.textContent;
    expect(notice).toContain('Line 48 of the file');
    expect(notice).toContain('Put values that hold a comma into quotes.');
  });

  it('puts the complaint about a taken name beside the name', async () => {
    await screen.drop(FILE);
    await screen.submit();
    const errors = [{ detail: 'Another record set has this name', pointer: '#/name' }];
    await screen.refuse(PATH, 409, { code: 'name-taken', detail: 'Choose another name.', errors });
    const control = screen.control('Name');
    expect(screen.page.querySelector(`#${control.id}-error`)?.textContent).toContain(
      'Another record set has this name',
    );
  });
});
