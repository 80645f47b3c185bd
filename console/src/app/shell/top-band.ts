import { NgTemplateOutlet } from '@angular/common';
import { Component, ElementRef, Injector, afterNextRender, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterLinkActive } from '@angular/router';
import { filter } from 'rxjs';
import { DESK_ROLES, ROLE_NAMES } from '../api/roles';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { ReferenceSearch } from '../ui/reference-search';
import { SECTION_LIST } from './sections';

type Panel = 'sections' | 'search' | 'person';

/** Desk name, the sections this person may use, and the person. On narrow screens the sections fold away. */
@Component({
  selector: 'tb-top-band',
  imports: [NgTemplateOutlet, ReferenceSearch, RouterLink, RouterLinkActive],
  templateUrl: './top-band.html',
  styleUrl: './top-band.scss',
  host: { '(keydown.escape)': 'close()', '(document:pointerdown)': 'closeIfOutside($event)' },
})
export class TopBand {
  private readonly router = inject(Router);
  private readonly injector = inject(Injector);
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
  protected readonly mayFind = computed(() => this.session.holds(...DESK_ROLES));
  protected readonly open = signal<Panel | undefined>(undefined);

  constructor() {
    const arrivals = this.router.events.pipe(filter((event) => event instanceof NavigationEnd));
    arrivals.pipe(takeUntilDestroyed()).subscribe(() => this.open.set(undefined));
  }

  protected toggle(panel: Panel): void {
    this.open.update((open) => (open === panel ? undefined : panel));
    if (this.open() === 'search') this.focusSearch();
  }

  private focusSearch(): void {
    const focus = (): void => this.element.nativeElement.querySelector<HTMLElement>('#search-panel input')?.focus();
    afterNextRender({ read: focus }, { injector: this.injector });
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
