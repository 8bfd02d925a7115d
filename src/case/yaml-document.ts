/**
 * Case text to a plain tree with positions. Only what a case needs of YAML 1.2 is let in: maps, lists and plain values. Anchors, aliases, tags,
 * merge keys and several documents are refused, so that a file is what it looks like and cannot grow when it is read.
 */
import {
  isAlias,
  isMap,
  isPair,
  isScalar,
  isSeq,
  LineCounter,
  parseAllDocuments,
  visit,
  type Document,
  type ParsedNode,
  type YAMLError,
} from 'yaml';
import type { ReportProblem, Span } from '../diagnostics/problem.js';
import type { CaseNode } from './case-node.js';
import { describeSyntaxError } from './syntax-texts.js';

const deepestNesting = 30;
const mostNodes = 20_000;
/** The parser's recursion bears far more; thirty levels are let in afterwards. */
const deepestBrackets = 300;
const compactNesting = /^[ \t]*(?:[-?:][ \t]+){30}/m;
/** A line with a percent sign in front of the document: a directive could switch to an older YAML, where `no` is no word. */
const directive = /^(?:[ \t]*(?:#[^\n]*)?\r?\n)*(?<directive>%[^\r\n]*)/;

/** @returns the root of the file; undefined where it cannot be read, with at least one problem reported */
export function readYamlDocument(text: string, report: ReportProblem): CaseNode | undefined {
  let faulty = false as boolean;
  const refuse = (
    code: Parameters<ReportProblem>[0]['code'],
    span: Span,
    found: string,
    expected: string,
    mend?: string,
  ): void => {
    faulty = true;
    report({ code, severity: 'error', path: '', span, found, expected, ...(mend !== undefined && { mend }) });
  };
  const deep = findTooDeep(text);
  if (deep !== undefined) {
    const span = { start: deep, end: deep + 1 };
    refuse('yaml_forbidden', span, 'collections nested far too deep', 'a plain case file');
    return undefined;
  }
  const directed = directive.exec(text)?.groups?.['directive'];
  if (directed !== undefined) {
    const start = text.indexOf(directed);
    const span = { start, end: start + directed.length };
    refuse('yaml_forbidden', span, 'a YAML directive', 'a case without directives', 'remove the line');
    return undefined;
  }
  const documents = parseAllDocuments(text, {
    lineCounter: new LineCounter(),
    prettyErrors: false,
    uniqueKeys: false,
    version: '1.2',
    merge: false,
    strict: true,
  });
  if (!Array.isArray(documents) || documents.length === 0) {
    refuse(
      'empty_case',
      { start: 0, end: 0 },
      'an empty file',
      'a case: see `bedwright --help` and the cases folder',
    );
    return undefined;
  }
  if (documents.length > 1) {
    const second = documents[1]!;
    const start = second.range[0];
    refuse(
      'yaml_forbidden',
      { start, end: start + 3 },
      'a second document',
      'one case to a file',
      'move it to a file of its own',
    );
    return undefined;
  }
  const document = documents[0]! as Document.Parsed;
  for (const error of document.errors) reportSyntax(text, error, refuse);
  for (const warning of document.warnings) reportSyntax(text, warning, refuse);
  if (faulty) return undefined;
  if (document.contents === null) {
    refuse(
      'empty_case',
      { start: 0, end: Math.min(text.length, 1) },
      'a file without content',
      'a case: see the cases folder',
    );
    return undefined;
  }
  if (!refuseForbidden(document, refuse)) return undefined;
  return convert(document.contents, text, refuse);
}

type Refuse = (
  code: Parameters<ReportProblem>[0]['code'],
  span: Span,
  found: string,
  expected: string,
  mend?: string,
) => void;

const mergeKey = ['a merge key `<<`', 'every key written out', 'copy the keys here'] as const;

/** At least one character wide, so that there is something to point at. */
function spanOf({ range }: { readonly range?: readonly [number, number, number] | null }): Span {
  const [start, end] = range ?? [0, 0];
  return { start, end: Math.max(end, start + 1) };
}

const levelsAbove = (path: readonly unknown[]): number =>
  path.filter((above) => isMap(above) || isSeq(above)).length;

/** False where anything was refused. */
function refuseForbidden(document: Document.Parsed, report: Refuse): boolean {
  let isAllowed = true as boolean;
  const refuse: Refuse = (...fault) => {
    isAllowed = false;
    report(...fault);
  };
  let nodes = 0;
  visit(document, (_key, node, path) => {
    if (isPair(node)) {
      // What a merge key would have brought is missing: nothing more can be said of the case.
      if (isScalar(node.key) && node.key.value === '<<')
        refuse('yaml_forbidden', spanOf(node.key), ...mergeKey);
      return undefined;
    }
    const range = (node as ParsedNode | null)?.range;
    if (!range) return undefined;
    const span = { start: range[0], end: Math.max(range[1], range[0] + 1) };
    if (++nodes > mostNodes || levelsAbove(path) > deepestNesting) {
      refuse(
        'yaml_forbidden',
        span,
        `more than ${mostNodes} entries or ${deepestNesting} levels`,
        'a plain case file',
      );
      return visit.BREAK;
    }
    if (isAlias(node)) {
      refuse(
        'yaml_forbidden',
        span,
        `the alias \`*${node.source}\``,
        'every value written out',
        'copy the value here',
      );
      return undefined;
    }
    const { anchor, tag } = node as { anchor?: string; tag?: string };
    if (anchor !== undefined) {
      refuse('yaml_forbidden', span, `the anchor \`&${anchor}\``, 'values without anchors', 'remove it');
    }
    if (tag !== undefined)
      refuse('yaml_forbidden', span, `the tag \`${tag}\``, 'values without tags', 'remove it');
    return undefined;
  });
  return isAllowed;
}

function convert(node: ParsedNode | null, text: string, refuse: Refuse): CaseNode | undefined {
  if (node === null) return undefined;
  const span = { start: node.range[0], end: Math.max(node.range[1], node.range[0] + 1) };
  if (isScalar(node)) return convertScalar(node.value, node, span, text, refuse);
  if (isSeq(node)) {
    return {
      kind: 'list',
      span,
      items: node.items.flatMap((item) => {
        const converted = convert(item, text, refuse);
        return converted ? [converted] : [];
      }),
    };
  }
  if (!isMap(node)) return undefined;
  const entries = new Map<string, { keySpan: Span; value: CaseNode }>();
  for (const pair of node.items) {
    const key = pair.key;
    const keySpan = { start: key.range[0], end: Math.max(key.range[1], key.range[0] + 1) };
    const name = isScalar(key) ? key.value : undefined;
    if (typeof name !== 'string' && typeof name !== 'number' && typeof name !== 'boolean') {
      refuse('wrong_type', keySpan, 'a key that is no word', 'a word');
      continue;
    }
    // `no` and `NO` are words in YAML 1.2, but `true` is not: as a key it can only be meant as a word.
    const word = String(name);
    if (entries.has(word)) {
      refuse('duplicate_key', keySpan, `\`${word}\` a second time`, 'each key once', 'remove one of them');
      continue;
    }
    const written = pair.value;
    // `length:` with nothing behind it: the fault is best shown at the key.
    const isAbsent =
      written === null ||
      (isScalar(written) && written.value === null && written.range[0] === written.range[1]);
    const value = (isAbsent ? undefined : convert(written, text, refuse)) ?? {
      kind: 'scalar',
      span: keySpan,
      value: null,
      textStart: keySpan.start,
    };
    entries.set(word, { keySpan, value });
  }
  return { kind: 'map', span, entries };
}

function convertScalar(
  value: unknown,
  node: {
    readonly range?: readonly [number, number, number] | null;
    readonly source?: string;
    readonly type?: string;
  },
  span: Span,
  text: string,
  refuse: Refuse,
): CaseNode | undefined {
  if (typeof value === 'number' && !Number.isFinite(value)) {
    // `.inf`, `.nan` and `1e999` stay what was written: no key takes them, and each says what it takes instead.
    return { kind: 'scalar', span, value: node.source ?? String(value), textStart: span.start };
  }
  if (
    typeof value === 'string' ||
    typeof value === 'number' ||
    typeof value === 'boolean' ||
    value === null
  ) {
    return { kind: 'scalar', span, value, textStart: textStart(node.type, span.start, text) };
  }
  refuse('wrong_type', span, 'a value of a kind that cases do not have', 'a text or a number');
  return undefined;
}

/** Offset of the first character of a value's text: behind the quote, or below the line of `|` and `>`. */
function textStart(type: string | undefined, start: number, text: string): number {
  if (type === 'QUOTE_DOUBLE' || type === 'QUOTE_SINGLE') return start + 1;
  if (type !== 'BLOCK_LITERAL' && type !== 'BLOCK_FOLDED') return start;
  const lineBreak = text.indexOf('\n', start);
  return lineBreak < 0 ? start : lineBreak + 1;
}

/**
 * What would cost the parser its stack or minutes of time, found before it starts: nesting in flow brackets (counted roughly, texts and comments
 * included, hence the wide margin), and `- - - -` or `? ? ? ?` in one line.
 */
function findTooDeep(text: string): number | undefined {
  const run = compactNesting.exec(text);
  if (run) return run.index;
  let depth = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === 0x5b || code === 0x7b) {
      if (++depth > deepestBrackets) return i;
    } else if (code === 0x5d || code === 0x7d) depth = Math.max(0, depth - 1);
  }
  return undefined;
}

/** The parser's own words are for programmers; ours say what to do. */
function reportSyntax(text: string, error: YAMLError, refuse: Refuse): void {
  const [start, end] = error.pos;
  const at = Math.min(start, Math.max(0, text.length - 1));
  const span = { start: at, end: Math.max(Math.min(end, text.length), at + 1) };
  refuse('yaml_syntax', span, ...describeSyntaxError(error.code));
}
