import { Directive, ElementRef, afterNextRender, inject } from '@angular/core';

/** Takes the focus when it appears: the first field of a form that was just opened, the heading of a result. */
@Directive({ selector: '[tbFocusHere]' })
export class FocusHere {
  constructor() {
    const element = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
    afterNextRender({ read: () => element.focus() });
  }
}
