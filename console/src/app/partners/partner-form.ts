import { Component, OnInit, inject, input, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Partner } from '../api/contract';
import { PartnersClient } from '../api/partners-client';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { FocusHere } from '../ui/focus-here';
import { ProblemNotice } from '../ui/problem-notice';
import { emailComplaint, nameComplaint } from '../ui/text-rules';

/** Enters a partner, or changes the one given. */
@Component({
  selector: 'tb-partner-form',
  imports: [FormsModule, Field, FieldInput, FocusHere, ProblemNotice],
  templateUrl: './partner-form.html',
})
export class PartnerForm implements OnInit {
  private readonly partners = inject(PartnersClient);

  readonly partner = input<Partner>();
  readonly saved = output<Partner>();
  readonly cancelled = output();

  protected readonly form = new EntryForm<'name' | 'contactEmail'>();
  protected readonly name = signal('');
  protected readonly contactEmail = signal('');

  ngOnInit(): void {
    this.name.set(this.partner()?.name ?? '');
    this.contactEmail.set(this.partner()?.contactEmail ?? '');
  }

  protected submit(): void {
    const complaints = {
      name: nameComplaint(this.name(), 'the partner’s name'),
      contactEmail: emailComplaint(this.contactEmail()),
    };
    if (!this.form.accept(complaints)) return;
    const entry = { name: this.name().trim(), contactEmail: this.contactEmail().trim() };
    const partner = this.partner();
    const request = partner ? this.partners.change(partner.id, entry) : this.partners.create(entry);
    this.form.send(request, (answer) => this.saved.emit(answer));
  }
}
