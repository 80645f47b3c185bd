/** Finds what a person would find: by role and label. Looks through the whole document, so that dialogs count. */
const roles = {
  button: 'button, [role=button]',
  link: 'a[href]',
  heading: 'h1, h2, h3, h4',
  table: 'table',
  region: 'section, [role=region]',
  image: 'svg[role=img]',
  alert: '[role=alert]',
  status: '[role=status]',
  group: 'fieldset',
} as const;

export type PageRole = keyof typeof roles;

export function nameOf(element: Element): string {
  const named = element.getAttribute('aria-labelledby');
  const caption = element.querySelector('caption')?.textContent;
  const text =
    element.getAttribute('aria-label') ??
    (named ? document.getElementById(named)?.textContent : (caption ?? element.textContent)) ??
    '';
  return tidy(text);
}

export function everyOf(role: PageRole): readonly HTMLElement[] {
  return [...document.querySelectorAll<HTMLElement>(roles[role])];
}

export function maybe(role: PageRole, name: string | RegExp): HTMLElement | undefined {
  return everyOf(role).find((element) => matches(nameOf(element), name));
}

export function find(role: PageRole, name: string | RegExp): HTMLElement {
  const found = maybe(role, name);
  if (!found) throw new Error(`No ${role} named ${String(name)}; there are: ${everyOf(role).map(nameOf).join(' | ')}`);
  return found;
}

/** The control of the label that begins with these words, or that has them as its own label. */
export function field<Control extends HTMLElement = HTMLInputElement>(words: string): Control {
  const label = [...document.querySelectorAll('label')].find((candidate) =>
    tidy(candidate.textContent).startsWith(words),
  );
  const control = label?.control ?? document.querySelector(`[aria-label="${words}"]`);
  if (!control) throw new Error(`No field labelled ${words}`);
  return control as HTMLElement as Control;
}

export function type(words: string, text: string): void {
  const control = field<HTMLInputElement>(words);
  control.value = text;
  control.dispatchEvent(new Event('input', { bubbles: true }));
}

export function choose(words: string, value: string): void {
  const control = field<HTMLSelectElement>(words);
  control.value = value;
  if (control.value !== value) throw new Error(`${words} does not offer ${value}`);
  control.dispatchEvent(new Event('change', { bubbles: true }));
}

/** What is said beside a field: its hint and its error. */
export function saidBeside(words: string): string {
  const ids = field(words).getAttribute('aria-describedby') ?? '';
  return ids
    .split(' ')
    .map((id) => tidy(document.getElementById(id)?.textContent))
    .join(' ');
}

export function pageText(): string {
  return tidy(document.body.textContent);
}

/** Rows of a table as texts, its heading row first. */
export function tableTexts(table: HTMLElement): readonly (readonly string[])[] {
  return [...table.querySelectorAll('tr')].map((row) =>
    [...row.querySelectorAll('th, td')].map((cell) => tidy(cell.textContent)),
  );
}

function tidy(text: string | null | undefined): string {
  return (text ?? '').replace(/\s+/g, ' ').trim();
}

function matches(name: string, wanted: string | RegExp): boolean {
  return typeof wanted === 'string' ? name === wanted : wanted.test(name);
}
