import { TarebeamFormAttributes } from './attributes';
import { TarebeamFormEventMap } from './events';

/** `<tarebeam-form>` as a page's script meets it. */
export interface TarebeamFormElement extends HTMLElement, TarebeamFormAttributes {
  addEventListener<Name extends keyof TarebeamFormEventMap>(
    type: Name,
    listener: (this: TarebeamFormElement, event: TarebeamFormEventMap[Name]) => void,
    options?: boolean | AddEventListenerOptions,
  ): void;
  addEventListener(
    type: string,
    listener: EventListenerOrEventListenerObject,
    options?: boolean | AddEventListenerOptions,
  ): void;
}

declare global {
  interface HTMLElementTagNameMap {
    'tarebeam-form': TarebeamFormElement;
  }
}
