import { Component, computed, input } from '@angular/core';
import type { Specification } from '../../api/contract';
import { inputRemarks, specificationWords } from './specification-words';

/** A specification read back in sentences, with what was said of single inputs. */
@Component({
  selector: 'tb-specification-words',
  template: `
    <ul>
      @for (line of lines(); track line) {
        <li>{{ line }}</li>
      }
      @for (remark of remarks(); track remark.column) {
        <li class="remark">{{ remark.column }}: {{ remark.words }}.</li>
      }
    </ul>
  `,
  styles: `
    ul {
      max-width: var(--tb-measure);
      margin: 0;
      padding-left: var(--tb-space-4);
    }

    li {
      margin-bottom: var(--tb-space-1);
    }

    .remark {
      color: var(--tb-slate);
    }
  `,
})
export class SpecificationWords {
  readonly specification = input.required<Specification>();
  readonly unit = input.required<string>();

  protected readonly lines = computed(() => specificationWords(this.specification(), this.unit()));
  protected readonly remarks = computed(() =>
    this.specification()
      .inputs.map((asked) => ({ column: asked.column, words: inputRemarks(asked).join(', ') }))
      .filter((remark) => remark.words !== ''),
  );
}
