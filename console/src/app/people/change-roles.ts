import { Component, computed, inject, input, linkedSignal, output } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Person, Role } from '../api/contract';
import { PeopleClient } from '../api/people-client';
import { EntryForm } from '../ui/entry-form';
import { FocusHere } from '../ui/focus-here';
import { ProblemNotice } from '../ui/problem-notice';
import { RoleChoice } from './role-choice';
import { ROLES } from './role-words';

/** Changes what a person of the desk may do. */
@Component({
  selector: 'tb-change-roles',
  imports: [FocusHere, FormsModule, ProblemNotice, RoleChoice],
  template: `
    <form class="tb-form" novalidate (ngSubmit)="submit()">
      <h2 tabindex="-1" tbFocusHere>Roles of {{ person().name }}</h2>
      <tb-role-choice [(roles)]="roles" [offered]="offered" [error]="form.errorOf('roles')" />
      @if (form.problem(); as problem) {
        <tb-problem-notice [problem]="problem" [canRetry]="false" />
      }
      <div class="tb-actions">
        <button type="submit" class="tb-button" [attr.aria-disabled]="form.underWay() ? true : null">
          Keep the roles
        </button>
        <button type="button" class="tb-plain-button" (click)="cancelled.emit()">Cancel</button>
      </div>
    </form>
  `,
  styles: `
    h2 {
      font: var(--tb-type-body-strong);

      &:focus {
        outline: none;
      }
    }
  `,
})
export class ChangeRoles {
  private readonly people = inject(PeopleClient);

  readonly person = input.required<Person>();
  readonly changed = output<Person>();
  readonly cancelled = output();

  /** A person of the desk never becomes a partner's developer, who belongs to one partner: invite them anew. */
  protected readonly offered: readonly Role[] = ROLES.filter((role) => role !== 'partner-developer');
  protected readonly form = new EntryForm<'roles'>();
  protected readonly roles = linkedSignal<readonly Role[]>(() => this.person().roles);
  private readonly complaint = computed(() => (this.roles().length === 0 ? 'Choose at least one role' : undefined));

  protected submit(): void {
    if (!this.form.accept({ roles: this.complaint() })) return;
    this.form.send(this.people.change(this.person().id, { roles: [...this.roles()] }), (person) =>
      this.changed.emit(person),
    );
  }
}
