import { Component, computed, input, output } from '@angular/core';
import { formatBytes, formatShare } from '../../ui/figure';

/** How much of a file is away, with a way to stop. */
@Component({
  selector: 'tb-upload-progress',
  templateUrl: './upload-progress.html',
  styleUrl: './upload-progress.scss',
})
export class UploadProgress {
  readonly fileName = input.required<string>();
  readonly progress = input.required<{ readonly sent: number; readonly total: number }>();
  readonly beingRead = input.required<boolean>();
  readonly cancelled = output();

  protected readonly words = computed(() => {
    const { sent, total } = this.progress();
    if (this.beingRead()) return 'All of it has arrived. The desk is looking at the first rows.';
    if (total === 0) return 'Starting';
    return `${formatBytes(sent)} of ${formatBytes(total)}, ${formatShare(sent / total)}`;
  });
  /** Said once a stage, not once a packet. */
  protected readonly stage = computed(() =>
    this.beingRead() ? 'The desk is looking at the first rows' : 'Sending the file',
  );
}
