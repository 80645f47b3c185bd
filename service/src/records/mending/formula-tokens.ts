/** What is wrong with a formula, and at which character (from 1). */
export class FormulaError extends Error {
  constructor(
    message: string,
    readonly at: number,
  ) {
    super(`${message} (at character ${at})`);
    this.name = 'FormulaError';
  }
}

export interface Token {
  readonly kind: 'number' | 'text' | 'name' | 'word' | 'sign' | 'end';
  readonly text: string;
  readonly at: number;
}

/** Long enough for people; short enough that nesting cannot exhaust the stack. */
export const maximumFormulaLength = 500;

/**
 * `[name]` for any column; a bare word for a column whose name is one word. A bracket or a quotation mark that
 * belongs to the name or the text is written twice, as in SQL: `[length]] (m)]`, `"3"" planks"`.
 */
const pattern =
  /(?:(?<number>\d+\.?\d*(?:[eE][+-]?\d+)?|\.\d+)|"(?<text>(?:[^"]|"")*)"|\[(?<name>(?:[^\]]|\]\])+)\]|(?<word>[\p{L}_][\p{L}\p{N}_]*)|(?<sign><=|>=|<>|!=|[-+*/^()=<>,]))/uy;

const undoubled: Readonly<Partial<Record<string, (text: string) => string>>> = {
  text: (text) => text.replaceAll('""', '"'),
  name: (name) => name.replaceAll(']]', ']'),
};

export function tokensOf(formula: string): Token[] {
  if (formula.length > maximumFormulaLength)
    throw new FormulaError(`The formula is longer than ${maximumFormulaLength} characters`, maximumFormulaLength);
  const tokens: Token[] = [];
  let at = 0;
  while (formula.slice(at).trim() !== '') {
    at += /^\s*/u.exec(formula.slice(at))?.[0].length ?? 0;
    pattern.lastIndex = at;
    const match = pattern.exec(formula);
    if (!match?.groups) throw new FormulaError('This cannot stand in a formula', at + 1);
    const [kind, text] = Object.entries(match.groups).find(([, value]) => value !== undefined) as [
      Token['kind'],
      string,
    ];
    tokens.push({ kind, text: undoubled[kind]?.(text) ?? text, at: at + 1 });
    at = pattern.lastIndex;
  }
  return [...tokens, { kind: 'end', text: '', at: formula.length + 1 }];
}
