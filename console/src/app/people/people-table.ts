import { Component, DestroyRef, computed, inject, input, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatSortModule } from '@angular/material/sort';
import { filter } from 'rxjs';
import type { Invited, PartnerSummary, Person } from '../api/contract';
import { PeopleClient } from '../api/people-client';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { Confirm } from '../ui/confirm';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { listView } from '../ui/list-view';
import { MomentPipe } from '../ui/moment-pipes';
import { Pager, ROWS_A_PAGE } from '../ui/pager';
import { ProblemNotice } from '../ui/problem-notice';
import { StatusStamp } from '../ui/status-stamp';
import { TableBox } from '../ui/table-box';
import { ChangeRoles } from './change-roles';
import { PERSON_STAMPS, rolesWords } from './role-words';

@Component({
  selector: 'tb-people-table',
  imports: [ChangeRoles, Field, FieldInput, MatSortModule, MomentPipe, Pager, ProblemNotice, StatusStamp, TableBox],
  templateUrl: './people-table.html',
  styleUrl: './people-table.scss',
})
export class PeopleTable {
  private readonly client = inject(PeopleClient);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly session = inject(SessionStore);
  private readonly destroyRef = inject(DestroyRef);

  readonly people = input.required<readonly Person[]>();
  readonly partners = input<readonly PartnerSummary[]>([]);
  readonly changed = output<Person>();
  readonly invited = output<Invited>();

  protected readonly stamps = PERSON_STAMPS;
  protected readonly rolesWords = rolesWords;
  protected readonly view = listView<Person>(() => this.people(), {
    firstSort: { active: 'name', direction: 'asc' },
    sortKeys: {
      name: ({ name }) => name,
      roles: ({ roles }) => rolesWords(roles),
      state: ({ state }) => PERSON_STAMPS[state].word,
      lastSignInAt: ({ lastSignInAt }) => lastSignInAt,
    },
    words: ({ name, email, roles }) => `${name} ${email} ${rolesWords(roles)}`,
  });
  protected readonly findable = computed(() => this.people().length > ROWS_A_PAGE);
  /** Whose roles are being changed. */
  protected readonly changing = signal<string | undefined>(undefined);
  protected readonly opening = new EntryForm<never>();

  protected find(event: Event): void {
    if (event.target instanceof HTMLInputElement) this.view.filterBy(event.target.value);
  }

  protected partnerName({ partnerId }: Person): string | undefined {
    return this.partners().find(({ id }) => id === partnerId)?.name;
  }

  protected isMe({ id }: Person): boolean {
    return this.session.person()?.id === id;
  }

  protected rolesChanged(person: Person): void {
    this.changing.set(undefined);
    this.announcer.say(`${person.name} is now ${rolesWords(person.roles)}`);
    this.changed.emit(person);
  }

  protected close(person: Person): void {
    this.ask(person, {
      heading: `Close ${person.name}’s access?`,
      consequences: [
        `${person.name} is signed out everywhere at once and cannot sign in again.`,
        'What they did stays in the journal under their name.',
        'You can reopen it at any time.',
      ],
      verb: 'Close access',
      lasting: true,
    });
  }

  /** A new link for somebody whose first was lost or has run out; the earlier one stops working. */
  protected inviteAgain({ name, email, roles, partnerId }: Person): void {
    this.opening.send(this.client.invite({ name, email, roles, partnerId }), (invited) => this.invited.emit(invited));
  }

  protected reopen(person: Person): void {
    this.ask(person, {
      heading: `Reopen ${person.name}’s access?`,
      consequences: [`${person.name} can sign in again, as ${rolesWords(person.roles)}.`],
      verb: 'Reopen access',
    });
  }

  private ask(person: Person, request: Parameters<Confirm['ask']>[0]): void {
    const confirmed = this.confirm.ask(request).pipe(
      filter((yes) => yes),
      takeUntilDestroyed(this.destroyRef),
    );
    confirmed.subscribe(() => this.setClosed(person, person.state !== 'closed'));
  }

  private setClosed(person: Person, closed: boolean): void {
    this.opening.send(this.client.change(person.id, { closed }), (answer) => {
      this.announcer.say(`${person.name}’s access is ${closed ? 'closed' : 'open again'}`);
      this.changed.emit(answer);
    });
  }
}
