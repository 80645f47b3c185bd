import { formatMoment } from '../../ui/moment';
import type { Keeping } from './draft-keeper';

const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** `Kept at 14:10`, with the day where that was not today. */
export function keepingWords(keeping: Keeping, now = new Date()): string {
  switch (keeping.state) {
    case 'unchanged':
      return '';
    case 'keeping':
      return 'Keeping…';
    case 'kept':
      return keptWords(new Date(keeping.at), now);
    case 'failed':
      return `Not kept: ${firstLowered(keeping.problem.title)}. The desk is asked again every few seconds; leave this page open until it says “Kept”.`;
  }
}

function keptWords(at: Date, now: Date): string {
  return at.toDateString() === now.toDateString()
    ? `Kept at ${TIME.format(at)}`
    : `Kept on ${formatMoment(at.toISOString())}`;
}

function firstLowered(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}
