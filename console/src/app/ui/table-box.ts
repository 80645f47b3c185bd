import { Component, input } from '@angular/core';

/** Scrolls a wide table inside its own box, by keyboard too, so that the page itself never moves sideways. */
@Component({
  selector: 'tb-table-box',
  template: '<ng-content />',
  styles: `
    :host {
      display: block;
      // What is read and not seen is placed absolutely: kept inside the box, it cannot widen the page.
      position: relative;
      overflow-x: auto;
      // Room for the focus ring of whatever stands at the edge.
      padding: 2px;
      margin: -2px;
    }

    @media print {
      :host {
        overflow: visible;
      }
    }
  `,
  host: { role: 'region', tabindex: '0', '[attr.aria-label]': 'label()' },
})
export class TableBox {
  readonly label = input.required<string>();
}
