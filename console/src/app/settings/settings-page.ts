import { Component, computed, inject } from '@angular/core';
import type { Settings } from '../api/contract';
import { ROLE_NAMES } from '../api/roles';
import { SessionStore } from '../api/session-store';
import { SettingsClient } from '../api/settings-client';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { ProblemNotice } from '../ui/problem-notice';
import { Sheet } from '../ui/sheet/sheet';
import { SheetSection } from '../ui/sheet/sheet-section';
import { DeskForm } from './desk-form';

@Component({
  selector: 'tb-settings-page',
  imports: [DeskForm, LoadingState, ProblemNotice, Sheet, SheetSection],
  templateUrl: './settings-page.html',
  styleUrl: './settings-page.scss',
})
export class SettingsPage {
  private readonly client = inject(SettingsClient);
  private readonly session = inject(SessionStore);

  protected readonly settings = load(() => this.client.read());
  protected readonly person = this.session.person;
  protected readonly roles = computed(() =>
    this.session
      .roles()
      .map((role) => ROLE_NAMES[role])
      .join(', '),
  );
  protected readonly mayChange = computed(() => this.session.holds('administrator'));

  protected changed(settings: Settings): void {
    this.settings.set(settings);
    this.session.settingsChanged(settings);
  }
}
