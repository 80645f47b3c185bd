import { Directive, ElementRef, afterNextRender, booleanAttribute, inject, input } from '@angular/core';

/** Takes the focus when it appears: the first field of a form that was just opened, the heading of a result. */
@Directive({ selector: '[tbFocusHere]' })
export class FocusHere {
  readonly tbFocusHere = input(true, { transform: booleanAttribute });

  constructor() {
    const element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    afterNextRender({ read: () => this.tbFocusHere() && element.focus() });
  }
}
