import { expect, it } from 'vitest';
import type { Expression } from '../../src/expressions/expression.js';
import { createPropertyFunction } from '../../src/properties/fluid-property.js';

it('a constant has no derivatives', () => {
  const property = createPropertyFunction({ kind: 'constant', value: 3.1e-5 });
  expect(property.isConstant).toBe(true);
  expect(property.value(500, 2e5)).toBe(3.1e-5);
  expect(property.temperatureDerivative(500, 2e5)).toBe(0);
  expect(property.pressureDerivative(500, 2e5)).toBe(0);
});

it('a formula in T and P comes with its derivatives: 2e-7 T^0.7 (1 + 1e-8 P)', () => {
  const number = (value: number): Expression => ({ kind: 'number', value });
  const variable = (kind: 'temperature' | 'pressure'): Expression => ({
    kind: 'variable',
    variable: { kind },
  });
  const binary = (name: 'add' | 'multiply' | 'power', left: Expression, right: Expression): Expression => ({
    kind: 'binary',
    name,
    left,
    right,
  });
  const expression = binary(
    'multiply',
    binary('multiply', number(2e-7), binary('power', variable('temperature'), number(0.7))),
    binary('add', number(1), binary('multiply', number(1e-8), variable('pressure'))),
  );
  const property = createPropertyFunction({
    kind: 'formula',
    formula: { expression, dimension: [1, -1, -1, 0, 0], text: 'test' },
  });
  const [T, P] = [640, 1.6e5];
  expect(property.isConstant).toBe(false);
  expect(property.value(T, P) / (2e-7 * T ** 0.7 * (1 + 1e-8 * P))).toBeCloseTo(1, 14);
  expect(property.temperatureDerivative(T, P) / (1.4e-7 * T ** -0.3 * (1 + 1e-8 * P))).toBeCloseTo(1, 13);
  expect(property.pressureDerivative(T, P) / (2e-15 * T ** 0.7)).toBeCloseTo(1, 13);
});
