import { Injectable, signal } from '@angular/core';

/** A sheet's own name for the title bar, once it is known; until then the route's title stands. */
@Injectable({ providedIn: 'root' })
export class PageTitle {
  private readonly current = signal<string | undefined>(undefined);
  readonly name = this.current.asReadonly();

  set(name: string): void {
    this.current.set(name);
  }

  clear(): void {
    this.current.set(undefined);
  }
}
