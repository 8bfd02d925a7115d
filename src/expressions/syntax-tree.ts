/** The parser's tree as this program sees it: the few node types and fields that formulas are made of. */
import type { MathNode } from 'mathjs/number';

/** The parser's operator node, as far as it is used. */
export interface OperatorLike {
  readonly op: string;
  readonly fn: string;
  readonly args: readonly MathNode[];
  readonly implicit?: boolean;
}

/** A call. */
export interface CallLike {
  readonly fn: { readonly type: string; readonly name: string };
  readonly args: readonly MathNode[];
}

/** Something behind a dot or in brackets. */
export interface AccessorLike {
  readonly object: { readonly type: string; readonly name: string };
  readonly index?: {
    readonly dotNotation?: boolean;
    readonly dimensions?: readonly { readonly value?: unknown }[];
  };
}

/** Name of a symbol node. */
export function nameOf(node: MathNode): string {
  return (node as unknown as { name: string }).name;
}

/** What stands in parentheses. */
export function contentOf(node: MathNode): MathNode {
  return (node as unknown as { content: MathNode }).content;
}

/** Names in what may be a unit expression (products, quotients, numeric powers of names); undefined where it holds anything else. */
export function symbolsOf(node: MathNode): string[] | undefined {
  if (node.type === 'SymbolNode') return [nameOf(node)];
  if (node.type === 'ParenthesisNode') return symbolsOf(contentOf(node));
  if (node.type !== 'OperatorNode') return undefined;
  const { fn, args } = node as unknown as OperatorLike;
  const left = args[0] && symbolsOf(args[0]);
  if (!left) return undefined;
  if (fn === 'pow') return isPlainNumber(args[1]!) ? left : undefined;
  if (fn !== 'multiply' && fn !== 'divide') return undefined;
  const right = symbolsOf(args[1]!);
  return right && [...left, ...right];
}

/** Whether a node is a number literal, perhaps with a minus or in parentheses. */
export function isPlainNumber(node: MathNode): boolean {
  if (node.type === 'ConstantNode') return true;
  if (node.type === 'ParenthesisNode') return isPlainNumber(contentOf(node));
  const { fn, args } = node as unknown as OperatorLike;
  return node.type === 'OperatorNode' && fn === 'unaryMinus' && isPlainNumber(args[0]!);
}
