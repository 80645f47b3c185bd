import { Component, computed, inject, input, signal } from '@angular/core';
import { Router } from '@angular/router';
import { PeopleClient } from '../api/people-client';
import { Announcer } from '../ui/announcer';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { ProblemNotice } from '../ui/problem-notice';
import { lengthOf, lengthWords, passwordComplaint } from './password-length';

@Component({
  selector: 'tb-set-password',
  imports: [Field, FieldInput, ProblemNotice],
  templateUrl: './set-password.html',
})
export class SetPassword {
  private readonly people = inject(PeopleClient);
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);

  readonly token = input.required<string>();
  readonly email = input.required<string>();

  protected readonly form = new EntryForm<'password'>();
  protected readonly password = signal('');
  protected readonly isShown = signal(false);
  protected readonly hint = computed(() => lengthWords(lengthOf(this.password())));

  protected submit(event: Event): void {
    event.preventDefault();
    const password = this.password();
    if (!this.form.accept({ password: passwordComplaint(password) })) return;
    this.form.send(this.people.acceptInvitation(this.token(), password), () => this.goToSignIn());
  }

  private goToSignIn(): void {
    this.announcer.show('Your password is set.');
    void this.router.navigateByUrl('/sign-in');
  }
}
