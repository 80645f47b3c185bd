import { intervalSentence, valueText } from './answered-case';
import { FormFailure } from './failure-words';
import { Answer, Description } from './form-session';

/** What a screen reader is told without moving the focus. */
export function announcementFor(description: Description, answer: Answer, locale?: string): string {
  if (description.state === 'loading') {
    return 'Loading the form.';
  }
  switch (answer.state) {
    case 'asking':
      return 'Asking for the estimate.';
    case 'failed':
      return failureSentence(answer.failure);
    case 'answered': {
      const { estimate } = answer.answered;
      return `The estimate is ${valueText(estimate, locale)} ${estimate.unit}. ${intervalSentence(estimate, locale)}`;
    }
    case 'none':
      return description.state === 'failed' ? failureSentence(description.failure) : '';
  }
}

function failureSentence({ heading, text }: FormFailure): string {
  return `${heading}. ${text}`;
}
