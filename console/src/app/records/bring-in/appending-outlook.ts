import { Component, computed, input } from '@angular/core';
import type { ReadingProposal } from '../../api/contract';
import { namesInShort } from './names-in-short';

type Outlook = NonNullable<ReadingProposal['appending']>;

/** How the file's columns go with those of the revision that it is to be appended to. */
@Component({
  selector: 'tb-appending-outlook',
  template: `
    @if (outlook().lacking.length > 0) {
      <div class="lacking">
        <p>
          <strong>The file cannot be appended.</strong> Revision {{ number() }} has columns that this file does not
          have: {{ named(outlook().lacking) }}.
        </p>
        <p>
          Look whether the right header line is chosen, and the right sheet of a workbook. If the file calls them
          otherwise, give them the revision’s names in the file and send it again; or bring it in as a revision of its
          own.
        </p>
      </div>
    }
    @if (outlook().additional.length > 0) {
      <p>
        Only the file has {{ named(outlook().additional) }}:
        {{ outlook().additional.length === 1 ? 'this column is' : 'these columns are' }} set aside and never stored, nor
        is the original file kept, because it holds {{ outlook().additional.length === 1 ? 'it' : 'them' }}.
      </p>
    }
    @if (outlook().differing.length > 0) {
      <p>
        By itself the file would be read otherwise in {{ named(outlook().differing) }}. The kinds and units of revision
        {{ number() }} count; look at the preview whether that is right.
      </p>
    }
    @if (isAlike()) {
      <p>The file has the same columns as revision {{ number() }}, of the same kinds and units.</p>
    }
  `,
  styles: `
    :host {
      display: block;
    }

    .lacking {
      margin-bottom: var(--tb-space-3);
      padding-left: var(--tb-space-3);
      border-left: 3px solid var(--tb-madder);
    }

    p {
      overflow-wrap: anywhere;
    }

    .lacking > :last-child {
      margin-bottom: 0;
    }
  `,
})
export class AppendingOutlook {
  readonly outlook = input.required<Outlook>();

  protected readonly named = namesInShort;
  protected readonly number = computed(() => this.outlook().revision.number);
  protected readonly isAlike = computed(() => {
    const { lacking, additional, differing } = this.outlook();
    return lacking.length + additional.length + differing.length === 0;
  });
}
