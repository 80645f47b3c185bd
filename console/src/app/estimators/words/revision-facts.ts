import { Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionReference } from '../../api/contract';
import { countOf } from '../../ui/figure';

/** Which records something rests on, down to the file's checksum. */
@Component({
  selector: 'tb-revision-facts',
  imports: [RouterLink],
  template: `
    <dl class="tb-facts">
      <dt>Record set</dt>
      <dd>
        <a [routerLink]="['/records', revision().recordSetId]">{{ revision().recordSetName }}</a>
      </dd>
      <dt>Revision</dt>
      <dd>{{ revision().number }}, {{ rows() }}</dd>
      <dt>SHA-256 of the file</dt>
      <dd>
        <code>{{ revision().sha256 }}</code>
      </dd>
    </dl>
  `,
})
export class RevisionFacts {
  readonly revision = input.required<RevisionReference>();
  protected readonly rows = computed(() => countOf(this.revision().rowCount, 'row'));
}
