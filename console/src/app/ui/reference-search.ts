import { Component, inject, signal } from '@angular/core';
import { Router } from '@angular/router';
import { EntryForm } from './entry-form';
import { Field, FieldInput } from './field';

/** References as the contract forms them (`Id`), once spaces and capitals of a copied or spoken one are gone. */
const REFERENCE = /^[0-9a-z]{8,32}$/;

/** Leads from an estimate's reference to where its number came from. Stands wherever the desk may be asked. */
@Component({
  selector: 'tb-reference-search',
  imports: [Field, FieldInput],
  templateUrl: './reference-search.html',
  styleUrl: './reference-search.scss',
})
export class ReferenceSearch {
  private readonly router = inject(Router);

  protected readonly form = new EntryForm<'reference'>();
  protected readonly reference = signal('');

  protected submit(event: Event): void {
    event.preventDefault();
    const reference = this.reference().replace(/\s/g, '').toLowerCase();
    if (this.form.accept({ reference: complaintAbout(reference) }))
      void this.router.navigate(['/estimates', reference]);
  }
}

function complaintAbout(reference: string): string | undefined {
  if (reference === '') return 'Enter the reference that came with the estimate';
  return REFERENCE.test(reference) ? undefined : 'A reference is 8 to 32 letters and digits, such as 4k2m9x7q1b';
}
