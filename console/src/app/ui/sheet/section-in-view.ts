import { DestroyRef, Signal, afterRenderEffect, inject, signal } from '@angular/core';
import type { SheetSection } from './sheet-section';

/** Which of a sheet's sections the reader is at: the topmost one inside the upper part of the window. */
export class SectionInView {
  private readonly current = signal<string | undefined>(undefined);
  private readonly visible = new Set<Element>();
  private observer?: IntersectionObserver;

  readonly anchor = this.current.asReadonly();

  constructor(sections: Signal<readonly SheetSection[]>) {
    afterRenderEffect({ read: () => this.watch(sections()) });
    inject(DestroyRef).onDestroy(() => this.observer?.disconnect());
  }

  private watch(sections: readonly SheetSection[]): void {
    this.observer?.disconnect();
    this.visible.clear();
    this.observer = new IntersectionObserver((entries) => this.take(entries, sections), {
      rootMargin: '0px 0px -60% 0px',
    });
    sections.forEach(({ element }) => this.observer?.observe(element));
  }

  private take(entries: readonly IntersectionObserverEntry[], sections: readonly SheetSection[]): void {
    for (const { target, isIntersecting } of entries) {
      if (isIntersecting) this.visible.add(target);
      else this.visible.delete(target);
    }
    const topmost = sections.find(({ element }) => this.visible.has(element));
    if (topmost) this.current.set(topmost.anchor());
  }
}
