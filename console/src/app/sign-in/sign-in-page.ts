import { Component, computed, effect, inject, input, signal } from '@angular/core';
import { Router } from '@angular/router';
import { SessionStore } from '../api/session-store';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { formatWait } from '../ui/moment';
import { ProblemNotice } from '../ui/problem-notice';
import { Countdown } from './countdown';

@Component({
  selector: 'tb-sign-in-page',
  imports: [Field, FieldInput, ProblemNotice],
  templateUrl: './sign-in-page.html',
  styleUrl: './sign-in-page.scss',
})
export class SignInPage {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** Where the person was going; from the address. */
  readonly return = input<string>();
  /** Whether a session ended under way; from the address. */
  readonly ended = input<string>();

  protected readonly form = new EntryForm<'email' | 'password'>();
  protected readonly countdown = new Countdown();
  protected readonly email = signal('');
  protected readonly password = signal('');
  protected readonly passwordShown = signal(false);
  protected readonly buttonText = computed(() => {
    if (this.countdown.running()) return `Wait ${formatWait(this.countdown.seconds())}`;
    return this.form.underWay() ? 'Signing in' : 'Sign in';
  });

  constructor() {
    effect(() => {
      const wait = this.form.problem()?.retryAfter;
      if (wait !== undefined) this.countdown.start(wait);
    });
  }

  protected signIn(event: Event): void {
    event.preventDefault();
    if (this.countdown.running()) return;
    const [email, password] = [this.email().trim(), this.password()];
    const accepted = this.form.accept({
      email: email === '' ? 'Enter your e-mail address' : undefined,
      password: password === '' ? 'Enter your password' : undefined,
    });
    if (accepted) this.send(email, password);
  }

  private send(email: string, password: string): void {
    this.form.send(this.session.signIn({ email, password }), () => void this.router.navigateByUrl(this.destination()));
  }

  /** Only an address of ours: a link from outside must not lead a freshly signed-in person away. */
  private destination(): string {
    const wanted = this.return() ?? '/';
    return /^\/(?![/\\])/.test(wanted) ? wanted : '/';
  }
}
