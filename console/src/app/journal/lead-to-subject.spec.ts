import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { journalRoutes } from './journal.routes';

@Component({ template: 'elsewhere' })
class Elsewhere {}

const routes = [
  { path: 'journal', children: journalRoutes },
  { path: '**', component: Elsewhere },
];

/** Follows an entry's link up to where the service is asked. */
async function follow(address: string, path: string) {
  TestBed.configureTestingModule({
    providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter(routes)],
  });
  const harness = await RouterTestingHarness.create();
  const arrival = harness.navigateByUrl(address);
  await new Promise((resolve) => setTimeout(resolve));
  return { call: TestBed.inject(HttpTestingController).expectOne(path), arrival, harness };
}

describe('leading from the journal to an edition or a fit', () => {
  it.each([
    ['edition', '/api/editions/edition00004', '/estimators/refit-labour/editions/edition00004'],
    ['fit', '/api/fits/fit000000011', '/estimators/refit-labour/fits/fit000000011'],
  ])('reads the %s on the way, because it stands under its estimator', async (kind, path, address) => {
    const { call, arrival } = await follow(`/journal/${kind}/${path.split('/').at(-1)}`, path);
    call.flush({ estimator: 'refit-labour' });
    await arrival;
    expect(TestBed.inject(Router).url).toBe(address);
  });

  it('leads to the page for what is not there when it cannot be read', async () => {
    const { call, arrival, harness } = await follow('/journal/edition/edition00009', '/api/editions/edition00009');
    call.flush(null, { status: 404, statusText: 'Not Found' });
    await arrival;
    expect(harness.routeNativeElement?.textContent).toBe('elsewhere');
  });
});
