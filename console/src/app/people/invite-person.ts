import { Component, computed, inject, input, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Invited, PartnerSummary, Role } from '../api/contract';
import { PeopleClient } from '../api/people-client';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { FocusHere } from '../ui/focus-here';
import type { Load } from '../ui/load';
import { ProblemNotice } from '../ui/problem-notice';
import { emailComplaint, nameComplaint } from '../ui/text-rules';
import { RoleChoice } from './role-choice';

@Component({
  selector: 'tb-invite-person',
  imports: [Field, FieldInput, FocusHere, FormsModule, ProblemNotice, RoleChoice],
  templateUrl: './invite-person.html',
  styleUrl: './invite-person.scss',
})
export class InvitePerson {
  private readonly people = inject(PeopleClient);

  readonly partners = input.required<Load<readonly PartnerSummary[]>>();
  readonly invited = output<Invited>();
  readonly cancelled = output();

  protected readonly form = new EntryForm<'name' | 'email' | 'roles' | 'partnerId'>();
  protected readonly name = signal('');
  protected readonly email = signal('');
  protected readonly roles = signal<readonly Role[]>([]);
  protected readonly partnerId = signal('');
  protected readonly forPartner = computed(() => this.roles().includes('partner-developer'));

  protected submit(): void {
    if (!this.form.accept(this.complaints())) return;
    const request = this.people.invite({
      name: this.name().trim(),
      email: this.email().trim(),
      roles: [...this.roles()],
      partnerId: this.forPartner() ? this.partnerId() : null,
    });
    this.form.send(request, (invited) => this.invited.emit(invited));
  }

  private complaints() {
    return {
      name: nameComplaint(this.name(), 'the person’s name'),
      email: emailComplaint(this.email()),
      roles: this.roles().length === 0 ? 'Choose at least one role' : undefined,
      partnerId: this.forPartner() && this.partnerId() === '' ? 'Choose the partner they develop for' : undefined,
    };
  }
}
