/** Ways out of a rate law: whatever is no arithmetic on the names allowed is refused with one fault in the right place, and nothing runs. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Fault, ProblemCode } from '../../src/diagnostics/problem.js';
import { compileProperty } from '../../src/expressions/compile-property.js';
import { instantiate } from '../../src/expressions/compile/instantiate.js';
import { parseFormula, type FormulaScope } from '../../src/expressions/parse-formula.js';
import { compileRates } from '../../src/kinetics/compile-rates.js';
import { dimensionless } from '../../src/quantities/dimension.js';

const scope: FormulaScope = {
  constants: new Map([['k', { expression: { kind: 'number', value: 2 }, dimension: dimensionless }]]),
  speciesIds: ['A', 'B'],
  allowsTemperature: true,
  allowsPressure: true,
  equilibriumReaction: 0,
};

function read(text: string): { result: unknown; faults: Fault[] } {
  const faults: Fault[] = [];
  const result = parseFormula(text, scope, (fault) => faults.push(fault));
  return { result, faults };
}

interface Trick {
  readonly name: string;
  readonly text: string;
  readonly code?: ProblemCode;
  /** What the fault points at; where it is left out, any place within the text will do. */
  readonly at?: string;
}

const unknown = 'unknown_name';

const tricks: readonly Trick[] = [
  // Properties of JavaScript objects.
  { name: 'constructor', text: 'constructor', code: unknown, at: 'constructor' },
  { name: '__proto__', text: '__proto__', at: '_' },
  { name: 'prototype', text: 'prototype', code: unknown, at: 'prototype' },
  { name: 'p.constructor', text: 'p.constructor', code: unknown, at: 'constructor' },
  { name: 'p.__proto__', text: 'p.__proto__' },
  { name: 'p.prototype', text: 'p.prototype', code: unknown, at: 'prototype' },
  { name: 'p.toString', text: 'p.toString', code: unknown, at: 'toString' },
  { name: 'p.toString()', text: 'p.toString()' },
  { name: 'p.hasOwnProperty', text: 'c.hasOwnProperty', code: unknown, at: 'hasOwnProperty' },
  { name: 'y.valueOf', text: 'y.valueOf', code: unknown, at: 'valueOf' },
  { name: 'property of a constant', text: 'k.constructor', at: 'k.constructor' },
  { name: 'property of T', text: 'T.constructor', at: 'T.constructor' },
  { name: 'property of a species', text: 'p.A.B' },
  { name: 'constructor of a species', text: 'p.A.constructor' },
  { name: 'property of a number', text: '(1).constructor' },
  { name: 'property of a function', text: 'exp.constructor', at: 'exp.constructor' },
  { name: 'map without a species', text: 'p', at: 'p' },
  { name: 'map with a dot alone', text: 'p.' },
  { name: 'fugacity of no species', text: 'f.constructor', code: unknown, at: 'constructor' },
  { name: 'call of a species', text: 'p.A(1)' },
  // The parser's own language.
  { name: 'import', text: 'import(k)', at: 'import' },
  { name: 'import of an object', text: 'import({pi: 3})', at: '{' },
  { name: 'evaluate of a text', text: 'evaluate("1+1")', at: '"' },
  { name: 'evaluate', text: 'evaluate(k)', at: 'evaluate' },
  { name: 'parse', text: 'parse(k)', at: 'parse' },
  { name: 'compile', text: 'compile(k)', at: 'compile' },
  { name: 'parser', text: 'parser()', at: 'parser' },
  { name: 'simplify', text: 'simplify(k)', at: 'simplify' },
  { name: 'derivative', text: 'derivative(k, T)', at: 'derivative' },
  { name: 'createUnit', text: 'createUnit(foo)', at: 'createUnit' },
  { name: 'createUnit of a text', text: "createUnit('foo')", at: "'" },
  { name: 'config', text: 'config(k)', at: 'config' },
  { name: 'help', text: 'help(exp)', at: 'help' },
  { name: 'chain', text: 'chain(3)', at: 'chain' },
  { name: 'assignment', text: 'k = 3', at: '=' },
  { name: 'assignment to a species', text: 'p.A = 3', at: '=' },
  { name: 'definition of a function', text: 'g(x) = x', at: '=' },
  { name: 'redefinition of a function', text: 'exp(x) = x', at: '=' },
  { name: 'index by a text', text: 'p["A"]', at: '[' },
  { name: 'index by a number', text: 'p[1]', at: '[' },
  { name: 'text in double quotes', text: '"abc"', at: '"' },
  { name: 'text in single quotes', text: "'abc'", at: "'" },
  { name: 'template text', text: '`${k}`', at: '`' },
  { name: 'dollar', text: '$k', at: '$' },
  { name: 'array', text: '[1, 2]', at: '[' },
  { name: 'object', text: '{a: 1}', at: '{' },
  { name: 'range', text: '1:2', at: ':' },
  { name: 'semicolon', text: 'k; k', at: ';' },
  { name: 'new line', text: 'k\nk', at: '\n' },
  { name: 'carriage return', text: 'k\rk', at: '\r' },
  { name: 'line separator', text: 'k\u2028k', at: '\u2028' },
  { name: 'comment', text: 'k # note', at: '#' },
  { name: 'comment of JavaScript', text: 'k // note' },
  { name: 'block comment', text: 'k /* note */' },
  { name: 'null character', text: 'k\0', at: '\0' },
  // Characters that look like others, or like nothing.
  { name: 'Cyrillic letter', text: 'р.A', at: 'р' },
  { name: 'Greek letter', text: 'Τ * 1', at: 'Τ' },
  { name: 'fullwidth letter', text: 'ｅxp(1)', at: 'ｅ' },
  { name: 'fullwidth name', text: 'ｃｏｎｓｔｒｕｃｔｏｒ', at: 'ｃ' },
  { name: 'fullwidth parenthesis', text: 'exp（1）', at: '（' },
  { name: 'fullwidth digit', text: '１ + k', at: '１' },
  { name: 'mathematical letter beyond the first plane', text: 'k * 𝐤', at: '𝐤' },
  { name: 'zero-width space', text: 'k\u200b * 2', at: '\u200b' },
  { name: 'zero-width joiner', text: 'con\u200dstructor', at: '\u200d' },
  { name: 'byte order mark', text: '\ufeffk', at: '\ufeff' },
  { name: 'no-break space', text: 'k\u00a0* 2', at: '\u00a0' },
  { name: 'right-to-left override', text: 'k\u202e', at: '\u202e' },
  { name: 'combining mark', text: 'k\u0301', at: '\u0301' },
  { name: 'lone surrogate', text: 'k\ud800', at: '\ud800' },
  { name: 'backslash', text: 'p.\\u0041', at: '\\' },
  { name: 'hexadecimal escape', text: '\\x6b', at: '\\' },
  { name: 'at sign', text: '@k', at: '@' },
  // Functions that are not on the list.
  ...[
    'cos',
    'sin',
    'tan',
    'random',
    'randomInt',
    'round',
    'floor',
    'sum',
    'map',
    'filter',
    'forEach',
    'pow',
  ].map((name): Trick => ({ name: `function ${name}`, text: `${name}(k)`, at: name })),
  ...['typed', 'print', 'format', 'unit', 'number', 'string', 'factorial', 'gamma', 'sort', 'reviver'].map(
    (name): Trick => ({ name: `function ${name}`, text: `${name}(k)`, at: name }),
  ),
  // Names of the surroundings.
  ...[
    'this',
    'eval',
    'Function',
    'process',
    'globalThis',
    'require',
    'module',
    'window',
    'arguments',
    'Math',
  ].map((name): Trick => ({ name: `name ${name}`, text: name, code: unknown, at: name })),
  { name: 'call of eval', text: 'eval(1)', at: 'eval' },
  { name: 'call of Function', text: 'Function(1)(2)' },
  { name: 'process.exit', text: 'process.exit(1)' },
  { name: 'globalThis.process', text: 'globalThis.process', at: 'globalThis.process' },
  { name: 'require of a module', text: 'require(fs)', at: 'require' },
  // Constants of the parser's language that a user might not mean.
  ...['i', 'pi', 'e', 'tau', 'phi', 'LN2', 'SQRT2', 'version'].map((name): Trick => ({
    name: `constant ${name}`,
    text: name,
    code: unknown,
    at: name,
  })),
  ...['null', 'true', 'false', 'undefined', 'NaN', 'Infinity', 'end', 'in', 'mod'].map((name): Trick => ({
    name: `word ${name}`,
    text: `${name} * k`,
    at: name,
  })),
  { name: 'true behind a number', text: '2 + true', at: 'true' },
  { name: 'true before a number that could stand for it', text: 'true + 5', at: 'true' },
  // Operators that are not on the list.
  { name: 'conditional', text: 'k > 1 ? 2 : 3', at: '>' },
  { name: 'conditional on a number', text: 'k ? 2 : 3', at: '?' },
  { name: 'less than', text: 'k < 1', at: '<' },
  { name: 'equal', text: 'k == 1', at: '=' },
  { name: 'not equal', text: 'k != 1', at: '!' },
  { name: 'and', text: 'k and k', at: 'and' },
  { name: 'or', text: 'k or k', at: 'or' },
  { name: 'xor', text: 'k xor k', at: 'xor' },
  { name: 'not', text: 'not k', at: 'not' },
  { name: 'ampersands', text: 'k && k', at: '&' },
  { name: 'bars', text: 'k || k', at: '|' },
  { name: 'magnitude bars', text: '|k|', at: '|' },
  { name: 'bitwise complement', text: '~k', at: '~' },
  { name: 'factorial', text: 'k!', at: '!' },
  { name: 'transpose', text: "k'", at: "'" },
  { name: 'percent', text: '5 %', at: '%' },
  { name: 'remainder', text: 'k % 2', at: '%' },
  { name: 'mod', text: '5 mod k', at: 'mod' },
  { name: 'elementwise product', text: 'k .* k' },
  { name: 'elementwise quotient', text: 'k ./ k' },
  { name: 'elementwise power', text: 'k .^ 2' },
  { name: 'double star', text: 'k ** 2', at: '*' },
  { name: 'conversion by to', text: '5 to K', at: 'to' },
  { name: 'conversion by in', text: '5 in K', at: 'in' },
  { name: 'inch where the parser reads a conversion', text: '5 in', at: 'in' },
  { name: 'conversion of a quantity', text: '5 bar to Pa' },
  // Arguments.
  { name: 'exp of two', text: 'exp(1, 2)', at: 'exp(1, 2)' },
  { name: 'exp of none', text: 'exp()' },
  { name: 'exp without parentheses', text: 'exp', at: 'exp' },
  { name: 'exp in a product', text: 'k * exp', at: 'exp' },
  { name: 'min of one', text: 'min(k)' },
  { name: 'max of none', text: 'max()' },
  { name: 'unit as a function', text: 'bar(2)', at: 'bar' },
  { name: 'unit behind a number as a function', text: '1 bar(2)', at: 'bar' },
  { name: 'constant as a function', text: 'k(2)', at: 'k' },
  { name: 'comma', text: '1, 2', at: ',' },
  { name: 'pair in parentheses', text: '(1, 2)', at: ',' },
  // Numbers.
  { name: 'beyond the largest number', text: '1e999', at: '1e999' },
  { name: 'below the smallest number', text: '1e-999', at: '1e-999' },
  { name: 'hexadecimal number', text: '0x10', at: '0x' },
  { name: 'binary number', text: 'k * 0b11', at: '0b' },
  { name: 'octal number', text: '0o17 + k', at: '0o' },
  { name: 'separated digits', text: '1_000', at: '_' },
  { name: 'suffix of a big integer', text: '10n', code: unknown, at: 'n' },
  { name: 'overflow by folding', text: '1e308 * 10' },
  { name: 'division by zero', text: 'k / 0' },
  { name: 'division of a variable by zero', text: 'p.A / 0' },
  { name: 'logarithm of a negative number', text: 'log(-1)' },
  { name: 'root of a negative number', text: 'sqrt(-k)' },
  // Shape.
  { name: 'nothing', text: '' },
  { name: 'spaces', text: '   ' },
  { name: 'open parenthesis', text: '(k' },
  { name: 'closing parenthesis', text: 'k)' },
  { name: 'trailing operator', text: 'k *' },
  { name: '200 nested parentheses', text: `${'('.repeat(200)}k${')'.repeat(200)}`, at: '(' },
  { name: '200 nested calls', text: `${'exp('.repeat(200)}k${')'.repeat(200)}`, at: '(' },
  { name: '10 000 terms', text: Array.from({ length: 10_000 }, () => 'k').join('+') },
  { name: '4 000 characters of operators', text: '-'.repeat(3999) + '1' },
  { name: 'tower of powers', text: `${'2^'.repeat(700)}2` },
  { name: 'names without end', text: 'k'.repeat(3999), code: unknown, at: 'k'.repeat(3999) },
];

describe('a rate law that reaches for more than arithmetic', () => {
  it.each(tricks)('is refused: $name', ({ text, code = 'bad_formula', at }) => {
    const { result, faults } = read(text);
    expect(result).toBeUndefined();
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    const { start, end } = faults[0]!.span;
    expect(start).toBeGreaterThanOrEqual(0);
    expect(end).toBeGreaterThan(start);
    expect(end).toBeLessThanOrEqual(Math.max(1, text.length));
    if (at !== undefined) expect(text.slice(start, end)).toBe(at);
  });

  it('is refused by its length alone when it has a million characters, whatever they are', () => {
    for (const text of ['('.repeat(1e6), 'k+'.repeat(5e5), '"'.repeat(1e6), '\0'.repeat(1e6)]) {
      const { result, faults } = read(text);
      expect(result).toBeUndefined();
      expect(faults).toHaveLength(1);
      expect(faults[0]).toMatchObject({ code: 'bad_formula', found: 'a formula of 1000000 characters' });
    }
  });

  it('is refused by the count of its tokens before it is parsed', () => {
    const text = Array.from({ length: 1000 }, () => 'k').join('+');
    expect(text.length).toBeLessThan(4000);
    const { result, faults } = read(text);
    expect(result).toBeUndefined();
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({
      code: 'bad_formula',
      found: expect.stringContaining('terms and operators') as string,
    });
  });

  it('never stops the reader: random texts of a nasty alphabet give a formula or one fault', () => {
    const pieces = [
      ...Array.from('pcyfkTPRABKe.()[]{}+-*/^,;:=!?%#\'"`\\$@~|&<>_ \t\n\r\0'),
      ...[
        '0x',
        '1e',
        '1e308',
        '0',
        '12',
        '.5',
        'exp',
        'min',
        'max',
        'log',
        'sqrt',
        'abs',
        'K_eq',
        'p.A',
        'f.B',
      ],
      ...['bar', 'degC', 'true', 'null', 'NaN', 'to', 'in', 'mod', 'constructor', '__proto__', '=>', '**'],
      ...['\u200b', '\u2028', '\ufeff', '\ud800', '\udc00', 'ｅ', 'р', '²', '·', '−', '𝐤'],
    ];
    const nasty = fc
      .array(
        fc.oneof(
          { weight: 5, arbitrary: fc.constantFrom(...pieces) },
          fc.string({ unit: 'binary', maxLength: 2 }),
        ),
        {
          maxLength: 30,
        },
      )
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(nasty, (text) => {
        const { result, faults } = read(text);
        expect(faults).toHaveLength(result === undefined ? 1 : 0);
        for (const { span } of faults) {
          expect(span.start).toBeGreaterThanOrEqual(0);
          expect(span.end).toBeGreaterThan(span.start);
          expect(span.end).toBeLessThanOrEqual(Math.max(1, text.length));
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('never stops the compiler: what random texts of arithmetic mean is compiled or refused', () => {
    const pieces = [
      'k',
      'T',
      'P',
      '(',
      ')',
      '+',
      '-',
      '*',
      '/',
      '^',
      ',',
      'exp(',
      'log(',
      'min(',
      'max(',
      'sqrt(',
      'abs(',
    ];
    const numbers = [
      '0',
      '1',
      '2',
      '0.5',
      '1e-300',
      '1e300',
      '1e-320',
      '1.7e308',
      '1e21',
      '1e-7',
      ' 300 K ',
      ' 2 bar ',
    ];
    let compiled = 0;
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...pieces, ...numbers), { maxLength: 9 }), (parts) => {
        const formula = parseFormula(parts.join(''), { ...scope, speciesIds: [] }, () => undefined);
        if (!formula) return;
        compiled++;
        const property = compileProperty(formula);
        expect(typeof property.evaluate(500, 1e5)).toBe('number');
        expect(typeof property.temperatureDerivative(500, 1e5)).toBe('number');
      }),
      { numRuns: 5000 },
    );
    expect(compiled).toBeGreaterThan(100);
  });
});

describe('instantiate', () => {
  const none = (): number => 0;
  const make = (body: string): unknown => instantiate(['c', 'o', 'T', 'P', 'r', 'q'], body, none, none);

  it('makes a function of the lines of the emitter', () => {
    const run = make(
      'const t0 = c[o + 1];\nconst t1 = T * (-2.5e-7);\nconst t2 = t0 - t1;\nr[q + 0] = t2;',
    ) as (...values: unknown[]) => void;
    const rates = new Float64Array(1);
    run([7, 8], 0, 4e7, 0, rates, 0);
    expect(rates[0]).toBe(18);
  });

  it.each([
    'process.exit(1);',
    'return this;',
    'return globalThis;',
    'return eval(1);',
    'return k.constructor;',
    'const t1 = Math.constructor;',
    'const t1 = Math.random();',
    'const t1 = c.constructor;',
    'const t1 = c[o + 1]; process.exit(1);',
    'const t1 = t0 + t2 + process;',
    'const t1 = "text";',
    'const t1 = T; // note',
    'const t1 = T /* note */;',
    'let t1 = T;',
    't1 = T;',
    'r[q + 0] = process;',
    'r[q - 1] = T;',
    'c[o + 1] = T;',
    'r.constructor = T;',
    'if (T) return T;',
    '}; process.exit(1); {',
    'const t1 = k(T);',
    'const t1 = x(1, T);',
    'const t1 = T\u2028+ 1;',
    'const t1 = T\r+ 1;',
    ' const t1 = T;',
  ])('throws for the foreign line %s', (line) => {
    expect(() => make(line)).toThrow('unexpected line');
    expect(() => make(`const t0 = T;\n${line}\nr[q + 0] = t0;`)).toThrow('unexpected line');
  });

  it('is not reached by the text of a name: constants and species leave no trace in the code', () => {
    const hostile: FormulaScope = {
      ...scope,
      constants: new Map([
        ['process', { expression: { kind: 'number', value: 3 }, dimension: dimensionless }],
        [
          'constructor',
          { expression: { kind: 'variable', variable: { kind: 'temperature' } }, dimension: dimensionless },
        ],
      ]),
      speciesIds: ['toString', 'eval'],
    };
    const faults: Fault[] = [];
    const formula = parseFormula('process * constructor * y.eval', hostile, (fault) => faults.push(fault));
    expect(faults).toEqual([]);
    const { evaluate } = compileRates([formula!.expression], 2, () => ({ value: none, derivative: none }));
    expect(evaluate.toString()).not.toMatch(/process|constructor|eval|toString/);
    const rates = new Float64Array(1);
    evaluate(new Float64Array([0, 2]), 0, 10, 8.314462618, rates, 0);
    // y = c R T / P = 2 · 10, times 3 · 10.
    expect(rates[0]).toBeCloseTo(600, 9);
  });
});
