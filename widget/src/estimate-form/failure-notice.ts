import { ChangeDetectionStrategy, Component, input, ViewEncapsulation } from '@angular/core';
import { FormFailure } from './failure-words';

@Component({
  selector: 'tb-failure-notice',
  templateUrl: './failure-notice.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FailureNotice {
  readonly failure = input.required<FormFailure>();
}
