import { Component, DestroyRef, computed, inject, input, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { filter } from 'rxjs';
import type { Key, Site } from '../api/contract';
import { PartnersClient } from '../api/partners-client';
import { Announcer } from '../ui/announcer';
import { Confirm } from '../ui/confirm';
import { EmptyState } from '../ui/empty-state';
import { EntryForm } from '../ui/entry-form';
import { DayPipe } from '../ui/moment-pipes';
import { ProblemNotice } from '../ui/problem-notice';
import { TableBox } from '../ui/table-box';
import { siteConsequences } from './consequences';
import { SiteForm } from './site-form';

/** The origins whose pages may use a partner's embed keys. */
@Component({
  selector: 'tb-partner-sites',
  imports: [DayPipe, EmptyState, ProblemNotice, SiteForm, TableBox],
  templateUrl: './partner-sites.html',
  styleUrl: './partner-sites.scss',
})
export class PartnerSites {
  private readonly client = inject(PartnersClient);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);

  readonly partnerId = input.required<string>();
  readonly sites = input.required<readonly Site[]>();
  readonly keys = input.required<readonly Key[]>();
  readonly mayKeep = input(false);
  readonly changed = output<readonly Site[]>();

  protected readonly listing = signal(false);
  protected readonly removal = new EntryForm<never>();
  protected readonly formShown = computed(() => this.mayKeep() && this.listing());

  protected listed(site: Site): void {
    this.listing.set(false);
    this.announcer.say(`${site.origin} is listed`);
    this.changed.emit([...this.sites(), site]);
  }

  protected takeOff(site: Site): void {
    this.confirm
      .ask({
        heading: `Take ${site.origin} off the list?`,
        consequences: siteConsequences(site, this.sites(), this.keys()),
        verb: 'Take off the list',
        lasting: true,
      })
      .pipe(
        filter((yes) => yes),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe(() => this.remove(site));
  }

  private remove(site: Site): void {
    this.removal.send(this.client.removeSite(this.partnerId(), site.id), () => {
      this.announcer.say(`${site.origin} is off the list`);
      this.changed.emit(this.sites().filter(({ id }) => id !== site.id));
    });
  }
}
