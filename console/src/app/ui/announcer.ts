import { Injectable, signal } from '@angular/core';

/** Says results aloud to screen readers, and on screen where nothing else shows them (WCAG 4.1.3). */
@Injectable({ providedIn: 'root' })
export class Announcer {
  private readonly current = signal('');
  private readonly shown = signal<string | undefined>(undefined);
  readonly text = this.current.asReadonly();
  readonly notice = this.shown.asReadonly();

  /** For a change that the screen itself already shows. */
  say(text: string): void {
    // A live region only speaks when its text changes, so the same words twice get an invisible difference.
    this.current.update((before) => (before === text ? `${text}\u00a0` : text));
  }

  /** For a result that would otherwise pass unseen; it stays until it is dismissed or the next one comes. */
  show(text: string): void {
    this.say(text);
    this.shown.set(text);
  }

  dismiss(): void {
    this.shown.set(undefined);
  }
}
