/** What is wrong with an expression, and where: `at` counts characters from 0. */
export class ExpressionError extends Error {
  constructor(
    message: string,
    readonly at: number,
  ) {
    super(message);
  }
}

/** Worked out for an order n. */
export type Expression = (n: number) => number;

const numberPattern = /\d+(?:\.\d*)?(?:[eE][+-]?\d+)?|\.\d+(?:[eE][+-]?\d+)?/y;
const deepest = 50;

/**
 * Reads `expression := term (('+' | '-') term)*`, `term := factor (('*' | '/') factor)*`,
 * `factor := number | 'n' | 'h' | '-' factor | '(' expression ')'`. Nothing else is understood, so no text is run.
 */
class Reader {
  private at = 0;
  private depth = 0;
  constructor(private readonly text: string) {}

  read(): Expression {
    const expression = this.sum();
    this.skipSpaces();
    if (this.at < this.text.length) throw this.unexpected();
    return expression;
  }

  private sum(): Expression {
    let left = this.product();
    for (let sign = this.take('+-'); sign !== null; sign = this.take('+-')) {
      const [first, second] = [left, this.product()];
      left = sign === '+' ? (n) => first(n) + second(n) : (n) => first(n) - second(n);
    }
    return left;
  }

  private product(): Expression {
    let left = this.factor();
    for (let sign = this.take('*/'); sign !== null; sign = this.take('*/')) {
      const [first, second] = [left, this.factor()];
      left = sign === '*' ? (n) => first(n) * second(n) : (n) => first(n) / second(n);
    }
    return left;
  }

  private factor(): Expression {
    this.depth += 1;
    if (this.depth > deepest) throw new ExpressionError('Too many parentheses or signs', this.at);
    const factor = this.bareFactor();
    this.depth -= 1;
    return factor;
  }

  private bareFactor(): Expression {
    if (this.take('-') !== null) {
      const inner = this.factor();
      return (n) => -inner(n);
    }
    if (this.take('(') !== null) {
      const inner = this.sum();
      if (this.take(')') === null) throw new ExpressionError('A closing parenthesis is missing', this.at);
      return inner;
    }
    if (this.take('nh') !== null) return (n) => n;
    return this.number();
  }

  private number(): Expression {
    this.skipSpaces();
    numberPattern.lastIndex = this.at;
    const match = numberPattern.exec(this.text);
    if (match === null) throw this.unexpected();
    this.at += match[0].length;
    const value = Number(match[0]);
    return () => value;
  }

  private take(characters: string): string | null {
    this.skipSpaces();
    const next = this.text.charAt(this.at).toLowerCase();
    if (next === '' || !characters.includes(next)) return null;
    this.at += 1;
    return next;
  }

  private skipSpaces(): void {
    while (/\s/.test(this.text.charAt(this.at))) this.at += 1;
  }

  private unexpected(): ExpressionError {
    const found = this.text.charAt(this.at);
    const message =
      found === '' ? 'A number or n is missing at the end' : `“${found}” is not understood here`;
    return new ExpressionError(message, this.at);
  }
}

/**
 * Reads arithmetic of numbers, the order n, + - * / and parentheses, such as `0.15*15/n`.
 * @throws ExpressionError that says what is wrong and at which character
 */
export const parseExpression = (text: string): Expression => new Reader(text).read();
