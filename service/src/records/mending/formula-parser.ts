import { FormulaError, tokensOf, type Token } from './formula-tokens';

export type Comparison = '=' | '<>' | '<' | '<=' | '>' | '>=';
export type Arithmetic = '+' | '-' | '*' | '/' | '^';

export type FormulaNode =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'text'; readonly value: string; readonly at: number }
  | { readonly kind: 'column'; readonly name: string; readonly at: number }
  | {
      readonly kind: 'arithmetic';
      readonly sign: Arithmetic;
      readonly left: FormulaNode;
      readonly right: FormulaNode;
      readonly at: number;
    }
  | {
      readonly kind: 'comparison';
      readonly sign: Comparison;
      readonly left: FormulaNode;
      readonly right: FormulaNode;
      readonly at: number;
    }
  | {
      readonly kind: 'junction';
      readonly word: 'and' | 'or';
      readonly left: FormulaNode;
      readonly right: FormulaNode;
      readonly at: number;
    }
  | { readonly kind: 'not'; readonly of: FormulaNode; readonly at: number }
  | { readonly kind: 'missing'; readonly of: FormulaNode }
  | { readonly kind: 'call'; readonly name: string; readonly given: readonly FormulaNode[]; readonly at: number };

const comparisons: ReadonlySet<string> = new Set(['=', '<>', '!=', '<', '<=', '>', '>=']);

/**
 * Recursive descent over: or > and > not > comparison, `is missing` > + − > × ÷ > minus > power > number, "text",
 * column, function(…), (…). The result is data; nothing of a formula is ever run as code.
 */
class Parser {
  private next = 0;

  constructor(private readonly tokens: readonly Token[]) {}

  whole(): FormulaNode {
    const node = this.junction('or');
    const { kind, text, at } = this.token;
    if (kind !== 'end') throw new FormulaError(`“${text}” does not follow`, at);
    return node;
  }

  private get token(): Token {
    return this.tokens[this.next];
  }

  private take(): Token {
    return this.tokens[this.next++];
  }

  private takeWord(word: string): boolean {
    const found = this.token.kind === 'word' && this.token.text.toLowerCase() === word;
    if (found) this.next++;
    return found;
  }

  private takeSign(...signs: readonly string[]): Token | null {
    return this.token.kind === 'sign' && signs.includes(this.token.text) ? this.take() : null;
  }

  private junction(word: 'and' | 'or'): FormulaNode {
    const part = (): FormulaNode => (word === 'or' ? this.junction('and') : this.negation());
    let left = part();
    for (let { at } = this.token; this.takeWord(word); { at } = this.token)
      left = { kind: 'junction', word, left, right: part(), at };
    return left;
  }

  private negation(): FormulaNode {
    const { at } = this.token;
    return this.takeWord('not') ? { kind: 'not', of: this.negation(), at } : this.comparison();
  }

  private comparison(): FormulaNode {
    const left = this.sum();
    const { at } = this.token;
    if (this.takeWord('is')) return this.missing(left, at);
    const sign = this.takeSign(...comparisons);
    if (!sign) return left;
    return {
      kind: 'comparison',
      sign: sign.text === '!=' ? '<>' : (sign.text as Comparison),
      left,
      right: this.sum(),
      at,
    };
  }

  private missing(of: FormulaNode, at: number): FormulaNode {
    const negated = this.takeWord('not');
    if (!this.takeWord('missing')) throw new FormulaError('“missing” should follow “is”', this.token.at);
    const missing: FormulaNode = { kind: 'missing', of };
    return negated ? { kind: 'not', of: missing, at } : missing;
  }

  private sum(): FormulaNode {
    let left = this.product();
    for (let sign = this.takeSign('+', '-'); sign; sign = this.takeSign('+', '-'))
      left = this.arithmetic(sign, left, this.product());
    return left;
  }

  private product(): FormulaNode {
    let left = this.signed();
    for (let sign = this.takeSign('*', '/'); sign; sign = this.takeSign('*', '/'))
      left = this.arithmetic(sign, left, this.signed());
    return left;
  }

  private signed(): FormulaNode {
    const minus = this.takeSign('-');
    if (minus) return this.arithmetic(minus, { kind: 'number', value: 0 }, this.signed());
    const base = this.atom();
    const power = this.takeSign('^');
    return power ? this.arithmetic(power, base, this.signed()) : base;
  }

  private arithmetic(sign: Token, left: FormulaNode, right: FormulaNode): FormulaNode {
    return { kind: 'arithmetic', sign: sign.text as Arithmetic, left, right, at: sign.at };
  }

  private atom(): FormulaNode {
    const { kind, text, at } = this.take();
    if (kind === 'number') return { kind, value: Number(text) };
    if (kind === 'text') return { kind, value: text, at };
    if (kind === 'name') return { kind: 'column', name: text.trim(), at };
    if (kind === 'word')
      return this.takeSign('(')
        ? { kind: 'call', name: text.toLowerCase(), given: this.list(), at }
        : { kind: 'column', name: text, at };
    if (text !== '(')
      throw new FormulaError(kind === 'end' ? 'The formula breaks off' : `“${text}” does not fit here`, at);
    const inner = this.junction('or');
    if (!this.takeSign(')')) throw new FormulaError('A closing bracket is missing', this.token.at);
    return inner;
  }

  private list(): FormulaNode[] {
    const given = [this.junction('or')];
    while (this.takeSign(',')) given.push(this.junction('or'));
    if (!this.takeSign(')')) throw new FormulaError('A closing bracket is missing', this.token.at);
    return given;
  }
}

export const parseFormula = (formula: string): FormulaNode => new Parser(tokensOf(formula)).whole();
