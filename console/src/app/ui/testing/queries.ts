/** Finding things as people do: by what they say. */

export function wordsOf(element: Element): string {
  return (element.textContent ?? '').replace(/\s+/g, ' ').trim();
}

/** The element whose accessible name is the words, or else begins with them. */
export function named(root: HTMLElement, selector: string, name: string): HTMLElement {
  const elements = [...root.querySelectorAll<HTMLElement>(selector)];
  const nameOf = (element: HTMLElement): string => element.getAttribute('aria-label') ?? wordsOf(element);
  const found =
    elements.find((element) => nameOf(element) === name) ??
    elements.find((element) => nameOf(element).startsWith(name));
  if (!found) throw new Error(`There is no ${selector} “${name}” in: ${wordsOf(root)}`);
  return found;
}

/** The control that a label beginning with the words belongs to, whether it stands inside the label or is named by it. */
export function controlOf<Control extends HTMLElement = HTMLElement>(root: HTMLElement, label: string): Control {
  const found = named(root, 'label', label) as HTMLLabelElement;
  if (!found.control) throw new Error(`The label “${label}” belongs to no control`);
  return found.control as Control;
}
