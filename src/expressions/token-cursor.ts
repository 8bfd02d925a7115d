import type { Span } from '../diagnostics/problem.js';
import { FormulaFault } from './formula-fault.js';
import type { FormulaToken } from './scan-formula.js';

/**
 * Place of each leaf of the parser's tree in the text. The tree carries no offsets, but its leaves come in the order of the text: each
 * number and name is taken from the scanned tokens exactly once, and a tree that leaves any out was not read as the text stands.
 */
export class TokenCursor {
  readonly text: string;
  private readonly tokens: readonly FormulaToken[];
  private next = 0;

  constructor(text: string, tokens: readonly FormulaToken[]) {
    this.text = text;
    this.tokens = tokens;
  }

  /** A span with the marks just before and behind it, where they are the ones named. */
  widen(span: Span, before: string, after = ''): Span {
    const previous = this.tokens.findLast(({ end }) => end <= span.start);
    const following = this.tokens.find(({ start }) => start >= span.end);
    return {
      start: previous?.text === before ? previous.start : span.start,
      end: following?.text === after ? following.end : span.end,
    };
  }

  /** Takes the next number or name, if it is the one asked for. */
  take(kind: FormulaToken['kind'], text?: string): FormulaToken | undefined {
    const at = this.nextLeaf();
    const token = this.tokens[at];
    if (token?.kind !== kind || (text !== undefined && token.text !== text)) return undefined;
    this.next = at + 1;
    return token;
  }

  /** The next number or name, left where it is; undefined when there is none. */
  nextToken(): FormulaToken | undefined {
    return this.tokens[this.nextLeaf()];
  }

  /** The next of the names ahead that reads so. */
  ahead(name: string): FormulaToken | undefined {
    return this.tokens.slice(this.next).find(({ text }) => text === name);
  }

  /** Whether a number stands just before a token. */
  isBehindNumber(token: FormulaToken): boolean {
    return this.tokens[this.tokens.indexOf(token) - 1]?.kind === 'number';
  }

  /** Index of the next number or name; -1 when there is none. */
  private nextLeaf(): number {
    for (let at = this.next; at < this.tokens.length; at++) {
      if (this.tokens[at]!.kind !== 'mark') return at;
    }
    return -1;
  }

  /** The fault of something that formulas do not hold, at the next number or name. */
  unsupported(found: string, expected: string): FormulaFault {
    return new FormulaFault('bad_formula', this.nextToken() ?? this.tokens.at(-1)!, found, expected);
  }
}
