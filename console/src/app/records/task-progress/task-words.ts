import type { RecordTask } from '../../api/contract';
import { formatBytes, formatCount } from '../../ui/figure';

type Progress = RecordTask['progress'];
type Stage = Progress['stage'];

export const STAGE_WORDS: Readonly<Record<Stage, string>> = {
  waiting: 'Waiting for other work on records to end',
  reading: 'Reading the file',
  measuring: 'Measuring the columns',
  mending: 'Carrying out the steps',
  storing: 'Storing the rows',
};

/** `120 of 250 MB`, `12 of 30 columns`; nothing where only the desk knows what it counts. */
export function countWords({ stage, done, total }: Progress): string {
  if (total === 0) return '';
  if (stage === 'reading') return bytesOf(Math.min(done, total), total);
  if (stage === 'measuring') return `${formatCount(done)} of ${formatCount(total)} columns`;
  if (stage === 'mending') return `${formatCount(done)} of ${formatCount(total)} steps`;
  return '';
}

/** The unit is said once where both have it. */
function bytesOf(done: number, total: number): string {
  const whole = formatBytes(total);
  const unit = whole.slice(whole.search(/[^\d.,]/));
  const part = formatBytes(done);
  return `${part.endsWith(unit) ? part.slice(0, -unit.length) : part} of ${whole}`;
}
