import type { Estimate, Inputs } from '../api/contract';
import { EstimatesError, FailureCode } from '../api/estimates-error';

export interface TarebeamEstimateDetail {
  readonly estimate: Estimate;
  readonly inputs: Inputs;
}

export interface TarebeamErrorDetail {
  /** A code of the desk's problem details, or `unreachable`, `not-understood`, `service-invalid`. */
  readonly code: FailureCode;
  readonly message: string;
  readonly status?: number;
  readonly requestId?: string;
  readonly retryAfterSeconds?: number;
}

export interface TarebeamFormEventMap {
  'tarebeam-estimate': CustomEvent<TarebeamEstimateDetail>;
  'tarebeam-error': CustomEvent<TarebeamErrorDetail>;
}

/** Dispatched by hand: an output of Angular Elements neither bubbles nor leaves a shadow root that the page may have around it. */
export function dispatchEstimate(host: HTMLElement, { estimate, inputs }: TarebeamEstimateDetail): void {
  dispatch(host, 'tarebeam-estimate', { estimate, inputs });
}

export function dispatchError(host: HTMLElement, { code, message, details }: EstimatesError): void {
  const { detail, status, requestId, retryAfterSeconds } = details;
  dispatch(host, 'tarebeam-error', { code, message: detail ?? message, status, requestId, retryAfterSeconds });
}

/** The page gets a copy of its own: whatever its listeners do to it, the answer on the form stays as the desk gave it. */
function dispatch(
  host: HTMLElement,
  name: keyof TarebeamFormEventMap,
  detail: TarebeamEstimateDetail | TarebeamErrorDetail,
): void {
  host.dispatchEvent(
    new CustomEvent(name, { bubbles: true, composed: true, detail: JSON.parse(JSON.stringify(detail)) }),
  );
}
