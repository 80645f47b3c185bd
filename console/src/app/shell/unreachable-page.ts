import { Location } from '@angular/common';
import { Component, inject } from '@angular/core';
import { Router } from '@angular/router';

/** Shown in place of the asked-for page, whose address stays, when the service does not answer at all. */
@Component({
  selector: 'tb-unreachable-page',
  template: `
    <main class="tb-lone-page">
      <h1 class="tb-title">No answer from the desk</h1>
      <p class="tb-lead">The service did not answer. Check the connection; if it is sound, wait a minute.</p>
      <button type="button" class="tb-button" (click)="tryAgain()">Try again</button>
    </main>
  `,
})
export class UnreachablePage {
  private readonly location = inject(Location);
  private readonly router = inject(Router);

  protected tryAgain(): void {
    const address = this.location.path();
    const back = address.startsWith('/unreachable') ? '/' : address;
    void this.router.navigateByUrl(back, { onSameUrlNavigation: 'reload' });
  }
}
