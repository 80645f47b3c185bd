import { Component, ElementRef, inject, input } from '@angular/core';

/** One part of a sheet, with a heading that the margin leads to. */
@Component({
  selector: 'tb-sheet-section',
  template: `
    <section [id]="anchor()">
      <div class="head">
        <h2 tabindex="-1">{{ heading() }}</h2>
        <ng-content select="[tbSectionAction]" />
      </div>
      <ng-content />
    </section>
  `,
  styleUrl: './sheet-section.scss',
})
export class SheetSection {
  readonly element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  readonly heading = input.required<string>();
  /** The part's address within the page; unique on the sheet. */
  readonly anchor = input.required<string>();

  /** Brings the part into view; a reader who jumped here by keyboard goes on from here. */
  show(): void {
    this.element.scrollIntoView();
    this.element.querySelector('h2')?.focus({ preventScroll: true });
  }
}
