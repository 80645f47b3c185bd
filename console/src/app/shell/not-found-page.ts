import { Component } from '@angular/core';
import { RouterLink } from '@angular/router';

@Component({
  selector: 'tb-not-found-page',
  imports: [RouterLink],
  template: `
    <h1 class="tb-title">No such page</h1>
    <p class="tb-lead">The address may be mistyped, or the thing it led to may have been removed.</p>
    <p><a routerLink="/">Go to the desk</a></p>
  `,
})
export class NotFoundPage {}
