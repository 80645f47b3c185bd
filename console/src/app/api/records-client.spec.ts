import { HttpEventType, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import type { RecordSet } from './contract';
import { RecordsClient } from './records-client';
import type { Upload } from './upload';

describe('RecordsClient.bringIn', () => {
  const file = new File(['a,b\n1,2\n'], 'refits.csv');
  let http: HttpTestingController;
  let client: RecordsClient;

  beforeEach(() => {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    client = TestBed.inject(RecordsClient);
  });

  afterEach(() => http.verify());

  it('sends the fields before the file, as the service asks', () => {
    client.bringIn({ name: 'Refits', description: 'Six years', file }).subscribe();
    const { request } = http.expectOne('/api/record-sets');
    expect([...(request.body as FormData).keys()]).toEqual(['name', 'description', 'file']);
  });

  it('tells how many bytes are away, then what came of them', () => {
    const steps: Upload<RecordSet>[] = [];
    client.bringIn({ name: 'Refits', description: '', file }).subscribe((step) => steps.push(step));
    const call = http.expectOne('/api/record-sets');
    call.event({ type: HttpEventType.UploadProgress, loaded: 4, total: 8 });
    call.flush({ id: 'records1' });
    expect(steps).toEqual([
      { state: 'sending', sent: 4, total: 8 },
      { state: 'done', answer: { id: 'records1' } },
    ]);
  });

  it('stops the upload when nobody waits for it any more', () => {
    const subscription = client.bringIn({ name: 'Refits', description: '', file }).subscribe();
    const call = http.expectOne('/api/record-sets');
    subscription.unsubscribe();
    expect(call.cancelled).toBe(true);
  });
});
