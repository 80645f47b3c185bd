import { Component, inject } from '@angular/core';
import { RouterOutlet } from '@angular/router';
import { Announcer } from '../ui/announcer';
import { TopBand } from './top-band';

/** The frame around every signed-in screen. */
@Component({
  selector: 'tb-shell',
  imports: [RouterOutlet, TopBand],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
})
export class Shell {
  protected readonly announcer = inject(Announcer);

  /** A plain fragment link would leave the page (the base is /), so the skip link moves focus itself. */
  protected skipTo(main: HTMLElement, event: Event): void {
    event.preventDefault();
    main.focus();
  }
}
