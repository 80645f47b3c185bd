import { Component } from '@angular/core';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { EDITION_STAMPS } from '../stamps';
import { PageTitle } from '../page-title';
import { Sheet } from './sheet';
import { SheetSection } from './sheet-section';

const run = jest.fn();

@Component({
  imports: [Sheet, SheetSection],
  template: `
    <tb-sheet
      heading="Refit labour"
      [stamp]="stamp"
      [menu]="menu"
      [parent]="{ label: 'Estimators', link: '/estimators' }"
    >
      <button tbAction type="button">Start a new fit</button>
      <p tbLead>Ridge, 11 inputs</p>
      <tb-sheet-section heading="Editions" anchor="editions">four</tb-sheet-section>
      <tb-sheet-section heading="Fits" anchor="fits">nine</tb-sheet-section>
    </tb-sheet>
  `,
})
class Host {
  readonly stamp = EDITION_STAMPS['in-force'];
  readonly menu = [{ label: 'Withdraw', run }];
}

describe('Sheet', () => {
  let fixture: ComponentFixture<Host>;
  let page: HTMLElement;

  beforeEach(async () => {
    TestBed.configureTestingModule({ providers: [provideRouter([])] });
    fixture = TestBed.createComponent(Host);
    page = fixture.nativeElement as HTMLElement;
    await fixture.whenStable();
  });

  it('names the thing, its state and its one action in the head', () => {
    const head = page.querySelector('header')?.textContent;
    expect(page.querySelector('h1')?.textContent).toContain('Refit labour');
    expect(page.querySelector('h1')?.textContent).toContain('In force');
    expect(head).toContain('Start a new fit');
    expect(head).toContain('Ridge, 11 inputs');
  });

  it('leads from the margin to every section, by focus as well', async () => {
    const links = [...page.querySelectorAll<HTMLAnchorElement>('nav[aria-label="On this sheet"] a')];
    expect(links.map((link) => link.textContent?.trim())).toEqual(['Editions', 'Fits']);
    links[1].click();
    await fixture.whenStable();
    expect(document.activeElement?.textContent).toBe('Fits');
  });

  it('keeps secondary actions in a menu', async () => {
    [...page.querySelectorAll('button')].find((button) => button.textContent?.includes('More'))?.click();
    await fixture.whenStable();
    document.querySelector<HTMLElement>('[role="menuitem"]')?.click();
    expect(run).toHaveBeenCalledTimes(1);
  });

  it('gives its name to the title bar and takes it back when it goes', () => {
    expect(TestBed.inject(PageTitle).name()).toBe('Refit labour');
    fixture.destroy();
    expect(TestBed.inject(PageTitle).name()).toBeUndefined();
  });
});
