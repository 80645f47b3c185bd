import { Injectable, computed, inject, signal } from '@angular/core';
import { Observable, map, of, tap } from 'rxjs';
import type { Role, Session, SettingsChange, SignIn } from './contract';
import { SessionClient } from './session-client';

/** Who is signed in, for every screen. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly client = inject(SessionClient);
  private readonly session = signal<Session | undefined>(undefined);

  readonly person = computed(() => this.session()?.person);
  readonly roles = computed<readonly Role[]>(() => this.session()?.person.roles ?? []);
  readonly deskName = computed(() => this.session()?.deskName ?? 'Estimating desk');

  /** True when the person holds one of the roles. Reactive: it may stand in a template. */
  holds(...roles: readonly Role[]): boolean {
    return this.roles().some((role) => roles.includes(role));
  }

  /** Asks the service once; afterwards what is known is answered at once. */
  ensure(): Observable<Session> {
    const known = this.session();
    return known ? of(known) : this.client.read().pipe(tap((session) => this.session.set(session)));
  }

  signIn(credentials: SignIn): Observable<Session> {
    return this.client.signIn(credentials).pipe(tap((session) => this.session.set(session)));
  }

  signOut(): Observable<void> {
    return this.client.signOut().pipe(map(() => this.forget()));
  }

  /** The service no longer knows this session. */
  forget(): void {
    this.session.set(undefined);
  }

  /** Keeps the top band true after the settings were changed. */
  settingsChanged(change: SettingsChange): void {
    const { deskName } = change;
    if (deskName !== undefined) this.session.update((session) => session && { ...session, deskName });
  }
}
