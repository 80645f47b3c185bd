import { Pipe, PipeTransform } from '@angular/core';
import { NO_FIGURE } from './figure';
import { formatDay, formatMoment } from './moment';

/** `{{ edition.inForceAt | day }}` gives 3 November 2026. */
@Pipe({ name: 'day' })
export class DayPipe implements PipeTransform {
  transform(iso: string | null | undefined): string {
    return iso ? formatDay(iso) : NO_FIGURE;
  }
}

/** `{{ entry.at | moment }}` gives 3 Nov 2026, 14:05. */
@Pipe({ name: 'moment' })
export class MomentPipe implements PipeTransform {
  transform(iso: string | null | undefined): string {
    return iso ? formatMoment(iso) : NO_FIGURE;
  }
}
