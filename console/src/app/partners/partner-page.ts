import { Component, computed, inject, input, signal } from '@angular/core';
import type { Key, Partner, Site } from '../api/contract';
import { PartnersClient } from '../api/partners-client';
import { DESK_ROLES } from '../api/roles';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { CountPipe } from '../ui/figure-pipes';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { DayPipe } from '../ui/moment-pipes';
import type { ParentLink } from '../ui/page-head';
import { ProblemNotice } from '../ui/problem-notice';
import { Sheet } from '../ui/sheet/sheet';
import { SheetSection } from '../ui/sheet/sheet-section';
import { PartnerForm } from './partner-form';
import { PartnerKeys } from './partner-keys';
import { PartnerSites } from './partner-sites';

const PARTNERS: ParentLink = { label: 'Partners', link: '/partners' };

/** A partner's sheet: for the desk, and for the partner's own developers. */
@Component({
  selector: 'tb-partner-page',
  imports: [
    CountPipe,
    DayPipe,
    LoadingState,
    PartnerForm,
    PartnerKeys,
    PartnerSites,
    ProblemNotice,
    Sheet,
    SheetSection,
  ],
  templateUrl: './partner-page.html',
  styleUrl: './partner-page.scss',
})
export class PartnerPage {
  private readonly client = inject(PartnersClient);
  private readonly announcer = inject(Announcer);
  private readonly session = inject(SessionStore);

  readonly id = input.required<string>();

  protected readonly partner = load(() => this.client.read(this.id()));
  protected readonly changing = signal(false);
  protected readonly parent = computed(() => (this.session.holds(...DESK_ROLES) ? PARTNERS : undefined));
  protected readonly mayChange = computed(() => this.session.holds('administrator'));
  /** Sites and keys: the desk's administrators, and the partner's own developers. */
  protected readonly mayKeep = computed(() => this.mayChange() || this.session.person()?.partnerId === this.id());

  protected changed(partner: Partner): void {
    this.changing.set(false);
    this.partner.set(partner);
    this.announcer.say(`${partner.name} is changed`);
  }

  protected setSites(partner: Partner, sites: readonly Site[]): void {
    this.partner.set({ ...partner, sites: [...sites] });
  }

  protected setKeys(partner: Partner, keys: readonly Key[]): void {
    this.partner.set({ ...partner, keys: [...keys] });
  }
}
