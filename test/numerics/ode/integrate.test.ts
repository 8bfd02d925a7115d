import { describe, expect, it } from 'vitest';
import { integrate } from '../../../src/numerics/ode/integrate.js';
import type { IntegrationOptions, OdeProblem } from '../../../src/numerics/ode/problem.js';
import { interpolateInto } from '../../../src/numerics/ode/dense-output.js';
import { factoriseStageSystem, solveStages } from '../../../src/numerics/ode/stages.js';
import {
  complexEigenvalue,
  inverseTransform,
  realEigenvalue,
  stageMatrix,
  stagePositions,
  transform,
} from '../../../src/numerics/ode/tableau.js';
import { createOdeWorkspace } from '../../../src/numerics/ode/workspace.js';
import { solvedOdes } from '../../problems/ode-problems.js';

function options(
  size: number,
  tolerance: number,
  more: Partial<IntegrationOptions> = {},
): IntegrationOptions {
  return {
    relativeTolerance: tolerance,
    absoluteTolerances: new Float64Array(size).fill(tolerance * 1e-2),
    maximumStep: Infinity,
    maximumSteps: 10_000,
    outputPositions: new Float64Array(0),
    events: [],
    ...more,
  };
}

describe('Radau IIA tableau', () => {
  it('meets the simplifying conditions B(5) and C(3)', () => {
    const b = stageMatrix[2]!;
    for (let q = 1; q <= 5; q++) {
      const sum = stagePositions.reduce((total, c, i) => total + b[i]! * c ** (q - 1), 0);
      expect(Math.abs(sum - 1 / q)).toBeLessThan(1e-15);
    }
    for (let q = 1; q <= 3; q++) {
      stageMatrix.forEach((row, i) => {
        const sum = stagePositions.reduce((total, c, j) => total + row[j]! * c ** (q - 1), 0);
        expect(Math.abs(sum - stagePositions[i]! ** q / q)).toBeLessThan(1e-15);
      });
    }
  });

  it('is brought to block form by the transformation: A T Λ = T', () => {
    const { realPart: a, imaginaryPart: b } = complexEigenvalue;
    const lambda = [
      [realEigenvalue, 0, 0],
      [0, a, b],
      [0, -b, a],
    ];
    const at = (m: readonly (readonly number[])[], n: readonly (readonly number[])[]): number[][] =>
      m.map((row) => [0, 1, 2].map((j) => row.reduce((sum, value, k) => sum + value * n[k]![j]!, 0)));
    const left = at(at(stageMatrix, transform), lambda);
    left.forEach((row, i) => row.forEach((value, j) => expect(value).toBeCloseTo(transform[i]![j]!, 12)));
    at(transform, inverseTransform).forEach((row, i) =>
      row.forEach((value, j) => expect(value).toBeCloseTo(i === j ? 1 : 0, 12)),
    );
  });
});

describe('order of convergence', () => {
  /** One step of fixed length with exact stages, repeated over the interval; worst errors at the steps and in mid-step. */
  function errorsWithStep(
    problem: OdeProblem,
    exact: (x: number) => number,
    length: number,
    count: number,
  ): [number, number] {
    const workspace = createOdeWorkspace(1);
    const step = length / count;
    const state = Float64Array.of(exact(0));
    const middle = new Float64Array(1);
    workspace.scale.fill(1e-14);
    let worstInside = 0;
    let worstAtSteps = 0;
    for (let k = 0; k < count; k++) {
      const x = k * step;
      problem.evaluateJacobian(x, state, workspace.jacobian);
      factoriseStageSystem(workspace, step);
      workspace.stages.fill(0);
      // Stop only at rounding: the order of the method is what is measured, not that of the iteration.
      for (let repeat = 0; repeat < 4; repeat++) solveStages(problem, x, step, state, 1e30, workspace);
      interpolateInto(state, workspace.stages, 0.5, middle);
      worstInside = Math.max(worstInside, Math.abs(middle[0]! - exact(x + step / 2)));
      state[0]! += workspace.stages[2]!;
      worstAtSteps = Math.max(worstAtSteps, Math.abs(state[0]! - exact(x + step)));
    }
    return [worstAtSteps, worstInside];
  }

  it('is 5 at the steps and 4 between them (logistic growth)', () => {
    const logistic = solvedOdes[1]!;
    const counts = [8, 16, 32];
    const errors = counts.map((count) =>
      errorsWithStep(logistic.problem, (x) => logistic.exact(x)[0]!, 4, count),
    );
    for (let k = 1; k < counts.length; k++) {
      const orderAtSteps = Math.log2(errors[k - 1]![0] / errors[k]![0]);
      const orderBetween = Math.log2(errors[k - 1]![1] / errors[k]![1]);
      expect(Math.abs(orderAtSteps - 5)).toBeLessThan(0.4);
      expect(Math.abs(orderBetween - 4)).toBeLessThan(0.4);
    }
  });
});

describe.each(solvedOdes)('integrate: $name', ({ problem, interval, initialState, exact }) => {
  const [start, end] = interval;
  it.each([1e-4, 1e-6, 1e-8])('ends within a small multiple of the tolerance %f', (tolerance) => {
    const result = integrate(
      problem,
      interval,
      Float64Array.from(initialState),
      options(problem.size, tolerance),
    );
    expect(result.status).toBe('complete');
    expect(result.position).toBe(end);
    exact(end).forEach((value, i) =>
      expect(Math.abs(result.state[i]! - value)).toBeLessThan(10 * tolerance * (Math.abs(value) + 1e-2)),
    );
    // Steps grow as tolerance^(-1/4): a bound on the work, generous by about two.
    expect(result.work.steps).toBeLessThan(5 * tolerance ** -0.25);
  });

  it('gives outputs at the ends exactly', () => {
    const outputPositions = Float64Array.of(start, (start + end) / 2, end);
    const result = integrate(
      problem,
      interval,
      Float64Array.from(initialState),
      options(problem.size, 1e-8, { outputPositions }),
    );
    expect(result.reachedOutputs).toBe(3);
    expect([...result.outputs.slice(0, problem.size)]).toEqual(initialState);
    expect([...result.outputs.slice(2 * problem.size)]).toEqual([...result.state]);
  });
});

describe('dense output', () => {
  it('is as good as the tolerance where the problem is not stiff', () => {
    const { problem, interval, initialState, exact } = solvedOdes[1]!;
    const outputPositions = Float64Array.from({ length: 101 }, (_, k) => (8 * k) / 100);
    const result = integrate(
      problem,
      interval,
      Float64Array.from(initialState),
      options(1, 1e-6, { outputPositions }),
    );
    outputPositions.forEach((x, k) =>
      expect(Math.abs(result.outputs[k]! / exact(x)[0]! - 1)).toBeLessThan(1e-6),
    );
  });
});

describe('events', () => {
  const oscillator: OdeProblem = {
    size: 2,
    evaluate: (_x, y, f) => {
      f[0] = y[1]!;
      f[1] = -y[0]!;
      return true;
    },
    evaluateJacobian: (_x, _y, j) => {
      j.set([0, 1, -1, 0]);
      return true;
    },
  };

  it('are found with their direction, and a terminal one ends the run', () => {
    const result = integrate(
      oscillator,
      [0, 20],
      Float64Array.of(0, 1),
      options(2, 1e-9, {
        events: [
          { evaluate: (_x, y) => y[0]!, direction: -1, isTerminal: false },
          { evaluate: (_x, _y, derivative) => derivative[0]!, direction: 0, isTerminal: false },
          { evaluate: (x) => x - 10, direction: 1, isTerminal: true },
        ],
      }),
    );
    expect(result.status).toBe('terminal_event');
    expect(result.position).toBeCloseTo(10, 11);
    const zeros = result.events.filter(({ eventIndex }) => eventIndex === 0);
    expect(zeros).toHaveLength(2);
    expect(zeros[0]!.position).toBeCloseTo(Math.PI, 7);
    expect(zeros[1]!.position).toBeCloseTo(3 * Math.PI, 7);
    const extremes = result.events.filter(({ eventIndex }) => eventIndex === 1);
    expect(extremes.map(({ position }) => Math.round((2 * position) / Math.PI))).toEqual([1, 3, 5]);
    expect(result.state[0]!).toBeCloseTo(Math.sin(10), 7);
  });
});

describe('corners', () => {
  it('no equations, or no length', () => {
    const nothing: OdeProblem = { size: 0, evaluate: () => true, evaluateJacobian: () => true };
    expect(integrate(nothing, [0, 1], new Float64Array(0), options(0, 1e-6)).status).toBe('complete');
    const { problem, initialState } = solvedOdes[1]!;
    const result = integrate(problem, [0, 0], Float64Array.from(initialState), options(1, 1e-6));
    expect(result.status).toBe('complete');
    expect([...result.state]).toEqual(initialState);
  });

  it('a right side that cannot be computed ends the run where it stands', () => {
    const wall: OdeProblem = {
      size: 1,
      evaluate: (x, _y, f) => {
        f[0] = 1;
        return x < 0.4;
      },
      evaluateJacobian: (_x, _y, j) => {
        j[0] = 0;
        return true;
      },
    };
    const result = integrate(wall, [0, 1], Float64Array.of(0), options(1, 1e-6));
    expect(result.status).toBe('evaluation_failed');
    expect(result.position).toBeGreaterThan(0.399);
    expect(result.position).toBeLessThan(0.4);
  });

  it('a step limit ends the run', () => {
    const { problem, interval, initialState } = solvedOdes[1]!;
    const result = integrate(
      problem,
      interval,
      Float64Array.from(initialState),
      options(1, 1e-8, { maximumSteps: 5 }),
    );
    expect(result.status).toBe('step_limit');
  });

  it('a monitor can have a step repeated, with the same answer', () => {
    const { problem, interval, initialState, exact } = solvedOdes[1]!;
    let calls = 0;
    const result = integrate(
      problem,
      interval,
      Float64Array.from(initialState),
      options(1, 1e-6, { monitor: () => (++calls % 3 === 0 ? 'repeat' : 'accept') }),
    );
    expect(result.status).toBe('complete');
    expect(Math.abs(result.state[0]! - exact(8)[0]!)).toBeLessThan(1e-6);
  });
});
