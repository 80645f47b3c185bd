import { documentRules, printAlone } from './print-alone';

function part(): HTMLElement {
  const element = document.createElement('div');
  element.innerHTML =
    '<p>512 hours</p><details><summary>Table</summary></details><button class="no-print">Print</button>';
  document.body.append(element, document.createElement('aside'));
  return element;
}

/** jsdom cannot print; what would be printed is looked at instead. */
function printed(element: HTMLElement): { body: string; title: string; open: boolean } {
  const create = document.createElement.bind(document);
  const seen: { body: string; title: string; open: boolean }[] = [];
  const spy = jest.spyOn(document, 'createElement').mockImplementation((name: string) => {
    const made = create(name);
    if (made instanceof HTMLIFrameElement) {
      Object.defineProperty(made, 'contentWindow', {
        value: {
          addEventListener: () => undefined,
          focus: () => undefined,
          print: () => {
            const sheet = made.contentDocument;
            seen.push({
              body: sheet?.body.textContent ?? '',
              title: sheet?.title ?? '',
              open: sheet?.querySelector('details')?.open ?? false,
            });
          },
        },
      });
    }
    return made;
  });
  printAlone(element, 'Refit labour, e5k2m8q1');
  spy.mockRestore();
  if (seen.length !== 1) {
    throw new Error(`printed ${seen.length} times`);
  }
  return seen[0];
}

describe('printAlone', () => {
  afterEach(() => document.body.replaceChildren());

  it('prints the part with its title, unfolded and without its buttons', () => {
    expect(printed(part())).toEqual({ body: '512 hoursTable', title: 'Refit labour, e5k2m8q1', open: true });
  });

  it('leaves the part as it was, save for the hidden frame', () => {
    const element = part();
    printed(element);
    expect(element.querySelector('details')?.open).toBe(false);
    expect(element.querySelector('.no-print')).not.toBeNull();
    expect(element.querySelector('iframe')?.getAttribute('aria-hidden')).toBe('true');
  });
});

describe('documentRules', () => {
  it('turns the host into the body, and keeps the condition under which a rule holds', () => {
    expect(documentRules(':host { color: red; } :host([hidden]) { display: none; } .a { color: red; }')).toBe(
      'body { color: red; } body[hidden] { display: none; } .a { color: red; }',
    );
  });
});
