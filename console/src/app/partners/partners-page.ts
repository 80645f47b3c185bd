import { Component, computed, inject, signal } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import { Router, RouterLink } from '@angular/router';
import type { Partner, PartnerSummary } from '../api/contract';
import { everyItem } from '../api/page';
import { PartnersClient } from '../api/partners-client';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { EmptyState } from '../ui/empty-state';
import { Field, FieldInput } from '../ui/field';
import { CountPipe } from '../ui/figure-pipes';
import { listView } from '../ui/list-view';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { MomentPipe } from '../ui/moment-pipes';
import { PageHead } from '../ui/page-head';
import { Pager, ROWS_A_PAGE } from '../ui/pager';
import { ProblemNotice } from '../ui/problem-notice';
import { TableBox } from '../ui/table-box';
import { PartnerForm } from './partner-form';

@Component({
  selector: 'tb-partners-page',
  imports: [
    CountPipe,
    EmptyState,
    Field,
    FieldInput,
    LoadingState,
    MatSortModule,
    MomentPipe,
    PageHead,
    Pager,
    PartnerForm,
    ProblemNotice,
    RouterLink,
    TableBox,
  ],
  templateUrl: './partners-page.html',
  styleUrl: './partners-page.scss',
})
export class PartnersPage {
  private readonly client = inject(PartnersClient);
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);
  private readonly session = inject(SessionStore);

  protected readonly partners = load(() => everyItem((page) => this.client.list(page)));
  protected readonly all = computed(() => this.partners.value() ?? []);
  protected readonly view = listView<PartnerSummary>(this.all, {
    firstSort: { active: 'name', direction: 'asc' },
    sortKeys: {
      name: ({ name }) => name,
      siteCount: ({ siteCount }) => siteCount,
      keyCount: ({ keyCount }) => keyCount,
      estimateCount: ({ estimateCount }) => estimateCount,
      lastUsedAt: ({ lastUsedAt }) => lastUsedAt,
    },
    words: ({ name, contactEmail }) => `${name} ${contactEmail}`,
  });
  protected readonly findable = computed(() => this.all().length > ROWS_A_PAGE);
  protected readonly mayEnter = computed(() => this.session.holds('administrator'));
  protected readonly entering = signal(false);

  protected find(event: Event): void {
    if (event.target instanceof HTMLInputElement) this.view.filterBy(event.target.value);
  }

  protected entered(partner: Partner): void {
    this.announcer.say(`${partner.name} is entered`);
    void this.router.navigate(['/partners', partner.id]);
  }
}
