import { Pipe, PipeTransform } from '@angular/core';
import { FigureOptions, countOf, formatBytes, formatCount, formatFigure } from './figure';

/** `{{ 512.378 | figure: { unit: 'h', uncertainty: 38 } }}` gives 512 h. */
@Pipe({ name: 'figure' })
export class FigurePipe implements PipeTransform {
  transform(value: number | null | undefined, options: FigureOptions = {}): string {
    return formatFigure(value, options);
  }
}

/** `{{ rows | count }}` gives 2,391; `{{ rows | count: 'row' }}` gives 2,391 rows. */
@Pipe({ name: 'count' })
export class CountPipe implements PipeTransform {
  transform(count: number, one?: string, many?: string): string {
    return one === undefined ? formatCount(count) : countOf(count, one, many);
  }
}

@Pipe({ name: 'bytes' })
export class BytesPipe implements PipeTransform {
  transform(bytes: number): string {
    return formatBytes(bytes);
  }
}
