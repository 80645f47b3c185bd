import { Component, computed, inject, input } from '@angular/core';
import { PeopleClient } from '../api/people-client';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { MomentPipe } from '../ui/moment-pipes';
import { ProblemNotice } from '../ui/problem-notice';
import { SetPassword } from './set-password';

/** Refusals that a new invitation mends, and trying again does not. */
const NO_LONGER_GOOD: readonly string[] = ['invitation-spent', 'not-found', 'request-invalid'];

/** Where an invitation's link leads: the person sets a password and goes on to sign in. */
@Component({
  selector: 'tb-invitation-page',
  imports: [LoadingState, MomentPipe, ProblemNotice, SetPassword],
  templateUrl: './invitation-page.html',
  styleUrl: './invitation-page.scss',
})
export class InvitationPage {
  private readonly people = inject(PeopleClient);

  readonly token = input.required<string>();

  protected readonly invitation = load(() => this.people.readInvitation(this.token()));
  protected readonly isSpent = computed(() => NO_LONGER_GOOD.includes(this.invitation.problem()?.code ?? ''));
}
