/**
 * Widths of characters in ems, on the wide side of common sans-serif faces: the page's own font is not known when the
 * layout is made, and a layout that leaves a little too much room never overlaps.
 */
const NARROW = 0.34;
const WIDE = 0.92;
const CAPITAL = 0.72;
const FIGURE = 0.63;
const OTHER = 0.59;

export function textWidth(text: string, fontSize: number): number {
  return [...text].reduce((sum, character) => sum + widthOf(character), 0) * fontSize;
}

/** Cut to fit, with an ellipsis; at least one character stays. */
export function shortenTo(text: string, width: number, fontSize: number): string {
  // The scale may have been chosen so that this very label just fits; that must not fail by a rounding error.
  if (textWidth(text, fontSize) <= width + 0.01) {
    return text;
  }
  const characters = [...text];
  while (characters.length > 1 && textWidth(`${characters.join('')}…`, fontSize) > width) {
    characters.pop();
  }
  return `${characters.join('').trimEnd()}…`;
}

function widthOf(character: string): number {
  if (/[ijlftr.,:;'’|()[\]!\s-]/.test(character)) {
    return NARROW;
  }
  if (/[mwMW…@%&]/.test(character)) {
    return WIDE;
  }
  if (/[\d+−×–=]/.test(character)) {
    return FIGURE;
  }
  if (/\p{Lu}/u.test(character)) {
    return CAPITAL;
  }
  return /[\u1100-\uffdc]/u.test(character) ? WIDE * 1.15 : OTHER;
}
