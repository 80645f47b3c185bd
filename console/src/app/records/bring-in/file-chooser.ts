import { Component, input, model, signal } from '@angular/core';
import { BytesPipe } from '../../ui/figure-pipes';

const ACCEPTED = [
  ...[
    '.csv',
    '.tsv',
    '.txt',
    '.gz',
    '.xlsx',
    'text/csv',
    'text/tab-separated-values',
    'text/plain',
    'application/gzip',
  ],
  'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
].join(',');

let chooserCount = 0;

/** Takes one file, by the browser's own dialogue or dropped here. */
@Component({
  selector: 'tb-file-chooser',
  imports: [BytesPipe],
  templateUrl: './file-chooser.html',
  styleUrl: './file-chooser.scss',
})
export class FileChooser {
  readonly label = input.required<string>();
  readonly error = input<string>();
  readonly file = model<File>();

  protected readonly id = `tb-file-chooser-${++chooserCount}`;
  protected readonly accepted = ACCEPTED;
  protected readonly hovering = signal(false);

  protected take(files: FileList | null | undefined): void {
    const file = files?.[0];
    if (file) this.file.set(file);
  }

  protected hover(event: DragEvent): void {
    event.preventDefault();
    this.hovering.set(true);
  }

  protected drop(event: DragEvent): void {
    event.preventDefault();
    this.hovering.set(false);
    this.take(event.dataTransfer?.files);
  }
}
