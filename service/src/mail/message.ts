/** One letter in plain text. */
export interface Message {
  readonly to: { readonly name: string; readonly address: string };
  readonly subject: string;
  readonly text: string;
}
