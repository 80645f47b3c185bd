/**
 * A page whose policy forbids inline styles, and which gave no nonce, leaves the shadow root's style elements without rules.
 * A constructed stylesheet is not an inline style, so the same rules are handed over that way.
 */
export function adoptBlockedStyles(root: ShadowRoot | null): void {
  if (!root || !('adoptedStyleSheets' in root) || root.adoptedStyleSheets.length > 0) {
    return;
  }
  const blocked = [...root.querySelectorAll('style')].filter(({ sheet }) => sheet === null);
  root.adoptedStyleSheets = blocked.map(({ textContent }) => {
    const sheet = new CSSStyleSheet();
    sheet.replaceSync(textContent ?? '');
    return sheet;
  });
}
