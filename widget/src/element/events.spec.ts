import { estimateExample } from '../api/examples.fixture';
import { EstimatesError } from '../api/estimates-error';
import { dispatchError, dispatchEstimate, TarebeamFormEventMap } from './events';

/** A form inside a shadow root of the page's own, heard on the document. */
function heard<Name extends keyof TarebeamFormEventMap>(name: Name, dispatch: (form: HTMLElement) => void) {
  const outer = document.createElement('section');
  const form = document.createElement('div');
  outer.attachShadow({ mode: 'open' }).append(form);
  document.body.append(outer);
  const events: TarebeamFormEventMap[Name][] = [];
  const listen = (event: Event): void => void events.push(event as TarebeamFormEventMap[Name]);
  document.addEventListener(name, listen);
  dispatch(form);
  document.removeEventListener(name, listen);
  outer.remove();
  return events;
}

describe('events of the form', () => {
  it('bubble to the document, out of a shadow root that the page has around the form', () => {
    const inputs = { displacement: 9.8 };
    const events = heard('tarebeam-estimate', (form) =>
      dispatchEstimate(form, { estimate: estimateExample(), inputs }),
    );
    expect(events).toHaveLength(1);
    expect(events[0]).toBeInstanceOf(CustomEvent);
    expect(events[0].detail).toEqual({ estimate: estimateExample(), inputs });
  });

  it('carry a copy, so that a listener cannot change what the form shows', () => {
    const estimate = estimateExample();
    const [event] = heard('tarebeam-estimate', (form) => dispatchEstimate(form, { estimate, inputs: {} }));
    event.detail.estimate.value = 1;
    expect(estimate.value).toBe(512.3781);
  });

  it('say what failed by its code, in words, and how long to wait', () => {
    const error = new EstimatesError('rate-exceeded', 'Too many calls', {
      status: 429,
      detail: 'Wait a little.',
      retryAfterSeconds: 12,
      requestId: 'r1',
    });
    const [event] = heard('tarebeam-error', (form) => dispatchError(form, error));
    expect(event.detail).toEqual({
      code: 'rate-exceeded',
      message: 'Wait a little.',
      status: 429,
      requestId: 'r1',
      retryAfterSeconds: 12,
    });
  });
});
