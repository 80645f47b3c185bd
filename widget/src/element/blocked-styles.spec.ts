import { adoptBlockedStyles } from './blocked-styles';

/** jsdom has no constructed stylesheets; these stand for the browser's. */
class ConstructedSheet {
  rules = '';
  replaceSync(rules: string): void {
    this.rules = rules;
  }
}

interface Root {
  readonly root: ShadowRoot;
  readonly adopted: () => string[];
}

function rootWith(styles: readonly { rules: string; blocked: boolean }[]): Root {
  const root = document.createElement('div').attachShadow({ mode: 'open' });
  const elements = styles.map(({ rules, blocked }) => {
    const style = document.createElement('style');
    style.textContent = rules;
    Object.defineProperty(style, 'sheet', { value: blocked ? null : {} });
    return style;
  });
  root.append(...elements);
  Object.defineProperty(root, 'adoptedStyleSheets', { value: [], writable: true });
  return { root, adopted: () => (root.adoptedStyleSheets as unknown as ConstructedSheet[]).map(({ rules }) => rules) };
}

describe('adoptBlockedStyles', () => {
  const real = globalThis.CSSStyleSheet;
  beforeAll(() => Object.assign(globalThis, { CSSStyleSheet: ConstructedSheet }));
  afterAll(() => Object.assign(globalThis, { CSSStyleSheet: real }));

  it('hands over the rules of style elements that the policy of the page blocked', () => {
    const { root, adopted } = rootWith([
      { rules: '.a{}', blocked: true },
      { rules: '.b{}', blocked: true },
    ]);
    adoptBlockedStyles(root);
    expect(adopted()).toEqual(['.a{}', '.b{}']);
  });

  it('leaves alone what the policy let pass', () => {
    const { root, adopted } = rootWith([{ rules: '.a{}', blocked: false }]);
    adoptBlockedStyles(root);
    expect(adopted()).toEqual([]);
  });

  it('does it once, however often the element comes back', () => {
    const { root, adopted } = rootWith([{ rules: '.a{}', blocked: true }]);
    adoptBlockedStyles(root);
    adoptBlockedStyles(root);
    expect(adopted()).toEqual(['.a{}']);
  });

  it('does nothing in a browser without constructed stylesheets', () => {
    const root = document.createElement('div').attachShadow({ mode: 'open' });
    expect(() => adoptBlockedStyles(root)).not.toThrow();
    expect(() => adoptBlockedStyles(null)).not.toThrow();
  });
});
