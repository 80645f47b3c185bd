import { HttpEventType, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import type { IncomingFile } from './contract';
import { IncomingFilesClient } from './incoming-files-client';
import type { Upload } from './upload';

describe('IncomingFilesClient', () => {
  const file = new File(['a,b\n1,2\n'], 'refits.csv');
  let http: HttpTestingController;
  let client: IncomingFilesClient;

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    client = TestBed.inject(IncomingFilesClient);
  });

  afterEach(() => http.verify());

  it('tells how many bytes are away, then what came of them', () => {
    const steps: Upload<IncomingFile>[] = [];
    client.send(file).subscribe((step) => steps.push(step));
    const call = http.expectOne('/api/incoming-files');
    expect([...(call.request.body as FormData).keys()]).toEqual(['file']);
    call.event({ type: HttpEventType.UploadProgress, loaded: 4, total: 8 });
    call.flush({ id: 'incoming1' });
    expect(steps).toEqual([
      { state: 'sending', sent: 4, total: 8 },
      { state: 'done', answer: { id: 'incoming1' } },
    ]);
  });

  it('stops the upload when nobody waits for it any more', () => {
    const subscription = client.send(file).subscribe();
    const call = http.expectOne('/api/incoming-files');
    subscription.unsubscribe();
    expect(call.cancelled).toBe(true);
  });

  it('names the revision to append to, and none for a file of its own', () => {
    client.propose('incoming1', {}, 'revision3').subscribe();
    client.propose('incoming1', { decimal: ',' }).subscribe();
    const calls = http.match(({ url }) => url === '/api/incoming-files/incoming1/proposal');
    expect(calls.map(({ request }) => request.params.get('appendTo'))).toEqual(['revision3', null]);
    expect(calls[1].request.body).toEqual({ decimal: ',' });
  });
});
