import { Component, input } from '@angular/core';
import { MatMenuModule } from '@angular/material/menu';

export interface SheetMenuItem {
  readonly label: string;
  readonly run: () => void;
}

/** Secondary actions of a sheet. */
@Component({
  selector: 'tb-sheet-menu',
  imports: [MatMenuModule],
  template: `
    <button type="button" class="tb-plain-button" [matMenuTriggerFor]="menu">
      More<span class="tb-only-read"> about {{ about() }}</span>
    </button>
    <mat-menu #menu="matMenu">
      @for (item of items(); track item.label) {
        <button mat-menu-item type="button" (click)="item.run()">{{ item.label }}</button>
      }
    </mat-menu>
  `,
})
export class SheetMenu {
  readonly items = input.required<readonly SheetMenuItem[]>();
  readonly about = input.required<string>();
}
