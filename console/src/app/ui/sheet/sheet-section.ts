import { Component, ElementRef, inject, input } from '@angular/core';

/** One part of a sheet, with a heading that the margin leads to. */
@Component({
  selector: 'tb-sheet-section',
  template: `
    <section [id]="anchor()" [attr.aria-labelledby]="anchor() + '-heading'" tabindex="-1">
      <div class="head">
        <h2 [id]="anchor() + '-heading'">{{ heading() }}</h2>
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

  /** A reader who jumps here by keyboard goes on from here. */
  takeFocus(): void {
    this.element.querySelector<HTMLElement>('section')?.focus({ preventScroll: true });
  }
}
