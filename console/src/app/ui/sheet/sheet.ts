import { Component, contentChildren, effect, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, RouterLink } from '@angular/router';
import { PageHead, ParentLink } from '../page-head';
import type { Stamp } from '../status-stamp';
import { SectionInView } from './section-in-view';
import type { SheetMenuItem } from './sheet-menu';
import { SheetSection } from './sheet-section';

/** A thing, opened: head, then sections, with the sections' names in the left margin on wide screens. */
@Component({
  selector: 'tb-sheet',
  imports: [RouterLink, PageHead],
  templateUrl: './sheet.html',
  styleUrl: './sheet.scss',
})
export class Sheet {
  readonly heading = input.required<string>();
  readonly stamp = input<Stamp>();
  readonly menu = input<readonly SheetMenuItem[]>([]);
  readonly parent = input<ParentLink>();

  protected readonly sections = contentChildren(SheetSection, { descendants: true });
  protected readonly inView = new SectionInView(this.sections);
  private readonly fragment = toSignal(inject(ActivatedRoute).fragment);

  constructor() {
    // The router scrolls when it arrives, which is before the sheet's answer has.
    effect(() => {
      const fragment = this.fragment();
      if (fragment)
        this.sections()
          .find((section) => section.anchor() === fragment)
          ?.show();
    });
  }
}
