import { Component, effect, inject, input, DestroyRef } from '@angular/core';
import { RouterLink } from '@angular/router';
import { PageTitle } from './page-title';
import { SheetMenu, SheetMenuItem } from './sheet/sheet-menu';
import { Stamp, StatusStamp } from './status-stamp';

/** Where a thing belongs, one step up. */
export interface ParentLink {
  readonly label: string;
  readonly link: string;
}

/**
 * The head of every screen: name, stamp, one primary action (`tbAction`), the rest in a menu, and a line about it
 * (`tbLead`). Names the browser's title too.
 */
@Component({
  selector: 'tb-page-head',
  imports: [RouterLink, SheetMenu, StatusStamp],
  templateUrl: './page-head.html',
  styleUrl: './page-head.scss',
})
export class PageHead {
  private readonly pageTitle = inject(PageTitle);

  readonly heading = input.required<string>();
  readonly stamp = input<Stamp>();
  readonly menu = input<readonly SheetMenuItem[]>([]);
  readonly parent = input<ParentLink>();

  constructor() {
    effect(() => this.pageTitle.set(this.heading()));
    inject(DestroyRef).onDestroy(() => this.pageTitle.clear());
  }
}
