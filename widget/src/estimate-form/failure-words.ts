import { EstimatesError } from '../api/estimates-error';

/** A failure as the form tells it. `forSite` is meant for whoever keeps the page, not for its visitor. */
export interface FormFailure {
  readonly heading: string;
  readonly text: string;
  readonly forSite: string | null;
  readonly requestId: string | null;
  /** Seconds until asking again makes sense; null where waiting is not what is needed. */
  readonly waitSeconds: number | null;
}

const DEFAULT_WAIT_SECONDS = 30;

export function failureWords(error: EstimatesError, origin: string): FormFailure {
  const { code, details } = error;
  const base = { forSite: null, requestId: details.requestId ?? null, waitSeconds: null };
  const detail = details.detail ?? error.message;
  switch (code) {
    case 'unreachable':
      return {
        ...base,
        heading: 'The estimating desk did not answer',
        text: 'Check your connection and try again.',
        forSite: `Check the attribute “service”, and that ${origin} is among the sites listed for this key at the desk.`,
      };
    case 'site-not-listed':
      return {
        ...base,
        heading: 'This site may not use the form yet',
        text: 'Please tell the people who keep this site.',
        forSite: `${detail} Ask the desk to list ${origin} for this key, or list it yourself in the partner area.`,
      };
    case 'rate-exceeded':
      return {
        ...base,
        heading: 'Many people are asking just now',
        text: detail,
        waitSeconds: details.retryAfterSeconds ?? DEFAULT_WAIT_SECONDS,
      };
    case 'quota-exceeded':
      return {
        ...base,
        heading: 'No more estimates for now',
        text: detail,
        forSite: 'The quota of this key is used up.',
      };
    case 'nothing-in-force':
    case 'edition-withdrawn':
      return { ...base, heading: 'No estimate is offered at present', text: detail };
    case 'inputs-invalid':
      return { ...base, heading: 'The desk could not use these entries', text: detail };
    case 'estimator-unknown':
    case 'key-missing':
    case 'key-malformed':
    case 'key-refused':
    case 'key-revoked':
    case 'key-expired':
    case 'key-out-of-scope':
    case 'service-invalid':
      return {
        ...base,
        heading: 'The form is not set up',
        text: 'Please tell the people who keep this site.',
        forSite: detail,
      };
    default:
      return {
        ...base,
        heading: 'No estimate could be made',
        text: code === 'not-understood' ? notUnderstood(error) : detail,
      };
  }
}

/** Said in place of the form when the element lacks what it needs to ask anything. */
export function notSetUp(missing: readonly string[]): FormFailure {
  const names = missing.map((name) => `“${name}”`).join(' and ');
  return {
    heading: 'The form is not set up',
    text: 'Please tell the people who keep this site.',
    forSite: `The element needs the attribute${missing.length > 1 ? 's' : ''} ${names}.`,
    requestId: null,
    waitSeconds: null,
  };
}

function notUnderstood({ details }: EstimatesError): string {
  return `The desk’s answer could not be read${details.status ? ` (status ${details.status})` : ''}. Try again in a few minutes.`;
}
