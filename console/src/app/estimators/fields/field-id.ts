let made = 0;

/** Ids that tie a label, a hint and an error to their control; unique on the page. */
export function nextFieldId(): string {
  made += 1;
  return `tb-field-${made}`;
}
