import { TAG_NAME } from './attributes';
import { registerForm } from './register';
import { TarebeamFormElement } from './tarebeam-form-element';

describe('registerForm', () => {
  afterEach(() => document.body.replaceChildren());

  it('may be called any number of times, also at once', async () => {
    await Promise.all([registerForm(null), registerForm(null)]);
    await registerForm('abc');
    expect(customElements.get(TAG_NAME)).toBeDefined();
  });

  it('hands attributes to the form, which says what is missing, and throws nothing into the page', async () => {
    await registerForm(null);
    const element: TarebeamFormElement = document.createElement(TAG_NAME);
    element.setAttribute('estimator', 'refit-labour');
    element.setAttribute('heading-level', '3');
    document.body.append(element);
    await new Promise((resolve) => setTimeout(resolve, 20));
    expect(element.estimator).toBe('refit-labour');
    expect(element.headingLevel).toBe(3);
    expect(element.shadowRoot?.textContent).toContain('The element needs the attributes “key” and “service”.');
    expect(document.head.querySelectorAll('style')).toHaveLength(0);
  });

  it('takes properties as well as attributes, also before it is on the page', async () => {
    await registerForm(null);
    const element: TarebeamFormElement = document.createElement(TAG_NAME);
    element.showBeam = false;
    document.body.append(element);
    expect(element.showBeam).toBe(false);
  });
});
