import { Component, computed, inject, signal } from '@angular/core';
import type { Invited, Person } from '../api/contract';
import { everyItem } from '../api/page';
import { PartnersClient } from '../api/partners-client';
import { PeopleClient } from '../api/people-client';
import { Announcer } from '../ui/announcer';
import { EmptyState } from '../ui/empty-state';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { PageHead } from '../ui/page-head';
import { ProblemNotice } from '../ui/problem-notice';
import { InvitationLink } from './invitation-link';
import { InvitePerson } from './invite-person';
import { PeopleTable } from './people-table';

@Component({
  selector: 'tb-people-page',
  imports: [EmptyState, InvitationLink, InvitePerson, LoadingState, PageHead, PeopleTable, ProblemNotice],
  templateUrl: './people-page.html',
  styleUrl: './people-page.scss',
})
export class PeoplePage {
  private readonly client = inject(PeopleClient);
  private readonly partnersClient = inject(PartnersClient);
  private readonly announcer = inject(Announcer);

  protected readonly people = load(() => everyItem((page) => this.client.list(page)));
  protected readonly all = computed(() => this.people.value() ?? []);
  /** For the names of partners; where it cannot be read, the form that needs it says so. */
  protected readonly partners = load(() => everyItem((page) => this.partnersClient.list(page)));
  protected readonly inviting = signal(false);
  protected readonly invited = signal<Invited | undefined>(undefined);

  protected take(invited: Invited): void {
    this.inviting.set(false);
    this.invited.set(invited);
    this.people.set([...this.all().filter(({ id }) => id !== invited.person.id), invited.person]);
    this.announcer.say(`${invited.person.name} is invited`);
  }

  protected changed(person: Person): void {
    this.people.set(this.all().map((kept) => (kept.id === person.id ? person : kept)));
  }
}
