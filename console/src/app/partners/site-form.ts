import { Component, inject, input, output, signal } from '@angular/core';
import { FormsModule } from '@angular/forms';
import type { Site } from '../api/contract';
import { PartnersClient } from '../api/partners-client';
import { EntryForm } from '../ui/entry-form';
import { Field, FieldInput } from '../ui/field';
import { FocusHere } from '../ui/focus-here';
import { ProblemNotice } from '../ui/problem-notice';
import { readOrigin } from './origin';

/** Lists an origin; the exact rules stand beside the field. */
@Component({
  selector: 'tb-site-form',
  imports: [FormsModule, Field, FieldInput, FocusHere, ProblemNotice],
  templateUrl: './site-form.html',
  styleUrl: './site-form.scss',
})
export class SiteForm {
  private readonly partners = inject(PartnersClient);

  readonly partnerId = input.required<string>();
  readonly listed = output<Site>();
  readonly cancelled = output();

  protected readonly form = new EntryForm<'origin'>();
  protected readonly origin = signal('');

  protected submit(): void {
    const reading = readOrigin(this.origin());
    const complaint = 'complaint' in reading ? reading.complaint : undefined;
    if (!this.form.accept({ origin: complaint }) || !('origin' in reading)) return;
    this.form.send(this.partners.addSite(this.partnerId(), reading.origin), (site) => this.listed.emit(site));
  }
}
