import { Component, inject, input, linkedSignal, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Settings } from '../api/contract';
import { SettingsClient } from '../api/settings-client';
import { Announcer } from '../ui/announcer';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { ProblemNotice } from '../ui/problem-notice';
import { emailComplaint, nameComplaint } from '../ui/text-rules';

@Component({
  selector: 'tb-desk-form',
  imports: [Field, FieldInput, FormsModule, ProblemNotice],
  templateUrl: './desk-form.html',
})
export class DeskForm {
  private readonly client = inject(SettingsClient);
  private readonly announcer = inject(Announcer);

  readonly settings = input.required<Settings>();
  readonly changed = output<Settings>();

  protected readonly form = new EntryForm<'deskName' | 'contactEmail'>();
  protected readonly deskName = linkedSignal(() => this.settings().deskName);
  protected readonly contactEmail = linkedSignal(() => this.settings().contactEmail);
  protected readonly kept = signal(false);

  protected submit(): void {
    this.kept.set(false);
    const complaints = {
      deskName: nameComplaint(this.deskName(), 'the desk’s name'),
      contactEmail: emailComplaint(this.contactEmail()),
    };
    if (!this.form.accept(complaints)) return;
    const request = this.client.change({ deskName: this.deskName().trim(), contactEmail: this.contactEmail().trim() });
    this.form.send(request, (settings) => this.keep(settings));
  }

  private keep(settings: Settings): void {
    this.kept.set(true);
    this.announcer.say('The settings are kept');
    this.changed.emit(settings);
  }
}
