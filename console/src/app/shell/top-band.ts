import { NgTemplateOutlet } from '@angular/common';
import { Component, ElementRef, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive } from '@angular/router';
import { filter } from 'rxjs';
import { ROLE_NAMES } from '../api/roles';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { SECTION_LIST } from './sections';

/** Desk name, the sections this person may use, and the person. On narrow screens the sections fold away. */
@Component({
  selector: 'tb-top-band',
  imports: [NgTemplateOutlet, RouterLink, RouterLinkActive],
  templateUrl: './top-band.html',
  styleUrl: './top-band.scss',
  host: { '(keydown.escape)': 'close()', '(document:pointerdown)': 'closeIfOutside($event)' },
})
export class TopBand {
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly session = inject(SessionStore);

  protected readonly sections = computed(() => SECTION_LIST.filter(({ roles }) => this.session.holds(...roles)));
  protected readonly roleNames = computed(() =>
    this.session
      .roles()
      .map((role) => ROLE_NAMES[role])
      .join(', '),
  );
  protected readonly open = signal<'sections' | 'person' | undefined>(undefined);

  constructor() {
    const arrivals = this.router.events.pipe(filter((event) => event instanceof NavigationEnd));
    arrivals.pipe(takeUntilDestroyed()).subscribe(() => this.open.set(undefined));
  }

  protected toggle(panel: 'sections' | 'person'): void {
    this.open.update((open) => (open === panel ? undefined : panel));
  }

  protected close(): void {
    const panel = this.open();
    if (panel === undefined) return;
    this.open.set(undefined);
    this.element.nativeElement.querySelector<HTMLElement>(`[aria-controls="${panel}-panel"]`)?.focus();
  }

  protected closeIfOutside(event: Event): void {
    if (event.target instanceof Node && !this.element.nativeElement.contains(event.target)) this.open.set(undefined);
  }

  protected signOut(): void {
    this.session.signOut().subscribe({
      next: () => void this.router.navigateByUrl('/sign-in'),
      error: () => this.announcer.show('You are still signed in: the desk did not answer. Try again.'),
    });
  }
}
