import { Injectable, effect, inject, signal } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { RouterStateSnapshot, TitleStrategy } from '@angular/router';
import { SessionStore } from '../api/session-store';
import { PageTitle } from '../ui/page-title';

/** `Refit labour · Marl Bay Yard Federation`: the page first, because tabs cut the end off. */
@Injectable({ providedIn: 'root' })
export class DeskTitle extends TitleStrategy {
  private readonly title = inject(Title);
  private readonly session = inject(SessionStore);
  private readonly pageTitle = inject(PageTitle);
  private readonly routeTitle = signal<string | undefined>(undefined);

  constructor() {
    super();
    effect(() => this.title.setTitle(this.text()));
  }

  override updateTitle(snapshot: RouterStateSnapshot): void {
    this.routeTitle.set(this.buildTitle(snapshot));
  }

  private text(): string {
    const page = this.pageTitle.name() ?? this.routeTitle();
    const desk = this.session.deskName();
    return page === undefined ? desk : `${page} · ${desk}`;
  }
}
