import { Component, DestroyRef, computed, inject, input, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { filter } from 'rxjs';
import type { Key, KeyIssued, Site } from '../api/contract';
import { KeysClient } from '../api/keys-client';
import { Announcer } from '../ui/announcer';
import { Confirm } from '../ui/confirm';
import { EmptyState } from '../ui/empty-state';
import { EntryForm } from '../ui/entry-form';
import { ProblemNotice } from '../ui/problem-notice';
import { keyConsequences } from './consequences';
import { IssuedKey } from './issued-key';
import { KeyForm } from './key-form';
import { KeysTable } from './keys-table';

/** A partner's keys: the list, issuing one, and the one look at a key just issued. */
@Component({
  selector: 'tb-partner-keys',
  imports: [EmptyState, IssuedKey, KeyForm, KeysTable, ProblemNotice],
  templateUrl: './partner-keys.html',
  styleUrl: './partner-keys.scss',
})
export class PartnerKeys {
  private readonly client = inject(KeysClient);
  private readonly confirm = inject(Confirm);
  private readonly announcer = inject(Announcer);
  private readonly destroyRef = inject(DestroyRef);

  readonly partnerId = input.required<string>();
  readonly sites = input.required<readonly Site[]>();
  readonly keys = input.required<readonly Key[]>();
  readonly mayKeep = input(false);
  readonly changed = output<readonly Key[]>();

  protected readonly issuing = signal(false);
  protected readonly issued = signal<KeyIssued | undefined>(undefined);
  protected readonly revocation = new EntryForm<never>();
  /** Live keys first: the others are kept to be read about. */
  protected readonly sorted = computed(() => {
    const live = ({ state }: Key): number => Number(state === 'live');
    return [...this.keys()].sort((a, b) => live(b) - live(a) || b.createdAt.localeCompare(a.createdAt));
  });

  protected take(issued: KeyIssued): void {
    this.issuing.set(false);
    this.issued.set(issued);
    this.announcer.say('The key is issued. It is shown this once.');
    this.changed.emit([...this.keys(), issued.details]);
  }

  protected revoke(key: Key): void {
    this.confirm
      .ask({
        heading: `Revoke the key “${key.label}”?`,
        consequences: keyConsequences(key, this.sites()),
        verb: 'Revoke the key',
        lasting: true,
      })
      .pipe(
        filter((yes) => yes),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe(() => this.revokeNow(key));
  }

  private revokeNow(key: Key): void {
    this.revocation.send(this.client.revoke(key.id), (revoked) => {
      this.announcer.say(`The key “${revoked.label}” is revoked`);
      if (this.issued()?.id === revoked.id) this.issued.set(undefined);
      this.changed.emit(this.keys().map((kept) => (kept.id === revoked.id ? revoked : kept)));
    });
  }
}
