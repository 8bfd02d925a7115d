import type { Fault, Problem, ReportFault, Span } from '../diagnostics/problem.js';
import { offsetInFile } from './offset-in-file.js';
import type { CaseNode } from './case-node.js';

export type CasePath = readonly (string | number)[];

/** The file being read, and where its faults go. */
export interface CaseContext {
  /** The whole text. */
  readonly source: string;
  readonly root: CaseNode;
  readonly report: (problem: Problem) => void;
}

/** `pellet.shape.sphere.diameter`, `reactions[1].rate` */
export function formatPath(path: CasePath): string {
  return path.reduce<string>(
    (text, part) => (typeof part === 'number' ? `${text}[${part}]` : text === '' ? part : `${text}.${part}`),
    '',
  );
}

/** The node at a path, or the nearest one above it that exists; `keySpan` is that of the last key found. */
export function locate(
  root: CaseNode,
  path: CasePath,
): { node: CaseNode; keySpan: Span | undefined; isExact: boolean } {
  let node = root;
  let keySpan: Span | undefined;
  for (const part of path) {
    const next: { value: CaseNode; keySpan: Span | undefined } | undefined =
      node.kind === 'map'
        ? node.entries.get(String(part))
        : node.kind === 'list' && typeof part === 'number' && node.items[part]
          ? { value: node.items[part], keySpan: undefined }
          : undefined;
    if (!next) return { node, keySpan, isExact: false };
    node = next.value;
    keySpan = next.keySpan ?? keySpan;
  }
  return { node, keySpan, isExact: true };
}

/** Where to point for a value: the value itself, or its key where the value is a whole map or list or absent. */
export function spanAt(context: CaseContext, path: CasePath): Span {
  const { node, keySpan, isExact } = locate(context.root, path);
  if (isExact && node.kind === 'scalar') return node.span;
  return keySpan ?? { start: node.span.start, end: node.span.start + 1 };
}

/**
 * Receives faults of the text at a path: their offsets are moved to where those characters stand in the file; where they stand there in another
 * form (escapes), faults point at the whole value.
 */
export function reportAt(context: CaseContext, path: CasePath): ReportFault {
  return (fault: Fault) => {
    const { node, isExact } = locate(context.root, path);
    const isText = isExact && node.kind === 'scalar';
    const start = isText ? offsetInFile(context.source, node, fault.span.start) : undefined;
    const last = isText
      ? offsetInFile(context.source, node, Math.max(fault.span.start, fault.span.end - 1))
      : undefined;
    const span = start === undefined || last === undefined ? spanAt(context, path) : { start, end: last + 1 };
    context.report({ ...fault, span, path: formatPath(path) });
  };
}

/** Reports one problem at a path. */
export function problemAt(
  context: CaseContext,
  path: CasePath,
  fault: Omit<Fault, 'span' | 'severity'> & Partial<Pick<Fault, 'severity'>>,
): void {
  context.report({ severity: 'error', ...fault, span: spanAt(context, path), path: formatPath(path) });
}

/** As {@link problemAt}, pointing at the key itself: for names that are wrong. */
export function keyProblemAt(
  context: CaseContext,
  path: CasePath,
  fault: Omit<Fault, 'span' | 'severity'>,
): void {
  const { keySpan } = locate(context.root, path);
  context.report({
    severity: 'error',
    ...fault,
    span: keySpan ?? spanAt(context, path),
    path: formatPath(path),
  });
}

/** Plain value of a node: maps as objects without a prototype. */
export function plainValue(node: CaseNode): unknown {
  switch (node.kind) {
    case 'scalar':
      return node.value;
    case 'list':
      return node.items.map(plainValue);
    case 'map': {
      const object = Object.create(null) as Record<string, unknown>;
      for (const [key, { value }] of node.entries) {
        Object.defineProperty(object, key, {
          value: plainValue(value),
          enumerable: true,
          configurable: true,
        });
      }
      return object;
    }
  }
}
