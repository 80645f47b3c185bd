import { Component, computed, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { ROLE_NAMES } from '../api/roles';
import { SessionStore } from '../api/session-store';

@Component({
  selector: 'tb-not-permitted-page',
  imports: [RouterLink],
  template: `
    <h1 class="tb-title">Not open to you</h1>
    <p class="tb-lead">
      You are signed in as {{ roles() }}, and this section needs another role. Ask an administrator of the desk if you
      should have it.
    </p>
    <p><a routerLink="/">Go to your first section</a></p>
  `,
})
export class NotPermittedPage {
  private readonly session = inject(SessionStore);
  protected readonly roles = computed(() =>
    this.session
      .roles()
      .map((role) => ROLE_NAMES[role].toLowerCase())
      .join(', '),
  );
}
