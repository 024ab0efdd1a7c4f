import { assertNumber } from '../numerics/assert-number.ts';

/** Standard acceleration of free fall. @source published: CGPM 1901 */
const gravityMPerS2 = 9.80665;

/**
 * Tension parameter H/w = T/(m·g).
 *
 * @param wire T [N] and m [kg/m], scalars, > 0
 * @returns H/w, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: horizontal tension over weight per length
 * @validity bare wire at the mean temperature of the coldest month, by the convention of the limits
 * @accuracy exact
 */
export function tensionParameter(wire: { readonly tensionN: number; readonly massKgPerM: number }): number {
  assertNumber('tensionN', wire.tensionN, { above: 0 });
  assertNumber('massKgPerM', wire.massKgPerM, { above: 0 });
  return wire.tensionN / (wire.massKgPerM * gravityMPerS2);
}

/**
 * Tension at a tension parameter, T = (H/w)·m·g.
 *
 * @param tensionParameterM H/w, scalar [m], ≥ 0
 * @param massKgPerM m, scalar [kg/m], > 0
 * @returns T, scalar [N]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity see tensionParameter
 * @accuracy exact
 */
export function tensionAtParameter(tensionParameterM: number, massKgPerM: number): number {
  assertNumber('tensionParameterM', tensionParameterM, { atLeast: 0 });
  assertNumber('massKgPerM', massKgPerM, { above: 0 });
  return tensionParameterM * massKgPerM * gravityMPerS2;
}

/** Terrain by its number in the table of safe design tensions. */
export type TerrainNumber = 1 | 2 | 3 | 4;

/** Safe design tension of undamped, single, bare conductors by terrain. */
export interface SafeTension {
  readonly tensionParameterM: number;
  readonly turbulenceIntensityRatio: number;
  readonly description: string;
}

/** @source from memory: CIGRE TB 273 (2005); title page and contents read, the table was not */
const safeTensions: Readonly<Record<TerrainNumber, SafeTension>> = {
  1: {
    tensionParameterM: 1000,
    turbulenceIntensityRatio: 0.11,
    description: 'open, flat, no trees, snow cover or near water',
  },
  2: { tensionParameterM: 1125, turbulenceIntensityRatio: 0.18, description: 'open, flat, no snow, such as farmland' },
  3: { tensionParameterM: 1225, turbulenceIntensityRatio: 0.25, description: 'flat or rolling, very few obstacles' },
  4: {
    tensionParameterM: 1425,
    turbulenceIntensityRatio: 0.35,
    description: 'built-up, woods, some trees and buildings',
  },
};

/**
 * Largest tension parameter at which an undamped, single, bare conductor is held to be safe, by terrain.
 *
 * @param terrain number of the terrain, 1 to 4
 * @returns H/w [m], turbulence intensity [ratio] and the terrain in words
 * @source from memory: CIGRE TB 273 (2005), not read
 * @validity undamped single conductors; above it a damper study is needed
 * @accuracy as recalled
 */
export function safeTension(terrain: TerrainNumber): SafeTension {
  return safeTensions[terrain];
}
