import { CSP_NONCE } from '@angular/core';
import { createCustomElement } from '@angular/elements';
import { createApplication } from '@angular/platform-browser';
import { EstimateForm } from '../estimate-form/estimate-form';
import { TAG_NAME } from './attributes';
import { RetainedStrategyFactory } from './retained-strategy';

/** Defines the element, once: a page may load the file twice, under two addresses, and two definitions would throw. */
export async function registerForm(nonce: string | null): Promise<void> {
  if (customElements.get(TAG_NAME)) {
    return;
  }
  const application = await createApplication({ providers: [{ provide: CSP_NONCE, useValue: nonce }] });
  if (customElements.get(TAG_NAME)) {
    application.destroy();
    return;
  }
  const element = createCustomElement(EstimateForm, {
    injector: application.injector,
    strategyFactory: new RetainedStrategyFactory(EstimateForm),
  });
  customElements.define(TAG_NAME, element);
}
