import { createFixedLaw } from './fixed-effectiveness.js';
import { FullPellet } from './full-pellet.js';
import { createGeneralisedModulusLaw } from './generalised-modulus.js';
import { LumpedPellet } from './lumped-pellet.js';
import type { PelletModel, PelletModelInput } from './pellet-model.js';
import type { PelletMethod } from './pellet-specification.js';

type Maker<Kind> = (input: PelletModelInput, method: Extract<PelletMethod, { kind: Kind }>) => PelletModel;

/** One entry per method of the case file. */
const makers: { readonly [Kind in PelletMethod['kind']]: Maker<Kind> } = {
  full: (input) => new FullPellet(input),
  thiele: (input) => new LumpedPellet(input, createGeneralisedModulusLaw(input), true),
  fixed: (input, method) => new LumpedPellet(input, createFixedLaw(input, method.effectiveness), false),
  intrinsic: (input) =>
    new LumpedPellet(
      input,
      createFixedLaw(
        input,
        input.stoichiometry.map(() => 1),
      ),
      false,
    ),
};

/** Makes the pellet sub-model that the specification asks for. */
export function createPelletModel(input: PelletModelInput): PelletModel {
  const { method } = input.pellet;
  const maker = makers[method.kind] as Maker<PelletMethod['kind']>;
  return maker(input, method);
}
