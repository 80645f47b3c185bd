/**
 * Prints one part of the page and nothing of the page around it: a copy goes into a frame of its own, beside the part and
 * inside the same shadow root, with the same rules as a constructed stylesheet (a policy against inline styles lets that pass).
 */
export function printAlone(part: HTMLElement, title: string): void {
  const view = part.ownerDocument.defaultView;
  const frame = part.ownerDocument.createElement('iframe');
  frame.title = 'Print';
  frame.className = 'print-frame';
  frame.setAttribute('aria-hidden', 'true');
  frame.tabIndex = -1;
  part.append(frame);
  const sheet = frame.contentDocument;
  const frameView = frame.contentWindow;
  if (!sheet || !frameView) {
    frame.remove();
    view?.print();
    return;
  }
  fill(sheet, { part, frame, title });
  frameView.addEventListener('afterprint', () => frame.remove());
  frameView.focus();
  frameView.print();
}

interface Printed {
  readonly part: HTMLElement;
  readonly frame: HTMLElement;
  readonly title: string;
}

function fill(sheet: Document, { part, frame, title }: Printed): void {
  sheet.title = title;
  sheet.documentElement.lang = 'en-GB';
  const body = sheet.importNode(part, true);
  body.querySelectorAll('iframe, .no-print').forEach((element) => element.remove());
  body.querySelectorAll('details').forEach((details) => (details.open = true));
  sheet.body.className = 'printed';
  sheet.body.append(body);
  adoptRules(sheet, rulesOf(frame));
}

/** The rules of the shadow root that the part stands in. */
function rulesOf(element: HTMLElement): string {
  const root = element.getRootNode();
  const sheets = root instanceof ShadowRoot ? [...root.styleSheets, ...root.adoptedStyleSheets] : [];
  return sheets.flatMap(({ cssRules }) => [...cssRules].map(({ cssText }) => cssText)).join('\n');
}

/** A constructed stylesheet belongs to the document whose constructor made it. */
function adoptRules(sheet: Document, rules: string): void {
  const constructor = sheet.defaultView?.CSSStyleSheet;
  if (constructor && 'adoptedStyleSheets' in sheet) {
    const styles = new constructor();
    styles.replaceSync(documentRules(rules));
    sheet.adoptedStyleSheets = [styles];
  }
}

/** What a shadow root says about its host, a document says about its body. */
export function documentRules(rules: string): string {
  return rules.replace(/:host\(([^)]*)\)/g, 'body$1').replace(/:host/g, 'body');
}
