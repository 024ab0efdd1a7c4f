import { assertNumber } from '../numerics/assert-number.ts';

/** Standard acceleration of free fall. @source published: CGPM 1901 */
const gravityMPerS2 = 9.80665;

/** A uniform sleeve of ice on a wire. */
export interface IceSleeve {
  readonly diameterM: number;
  readonly iceThicknessM: number;
  readonly iceDensityKgPerM3: number;
}

/**
 * Mass per length of a uniform sleeve of ice, ρπt(d + t).
 *
 * @param sleeve.diameterM          d, bare wire, scalar [m], > 0
 * @param sleeve.iceThicknessM      t, radial, scalar [m], ≥ 0
 * @param sleeve.iceDensityKgPerM3  ρ, scalar [kg/m³], > 0
 * @returns ice mass per length, scalar [kg/m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: area of a ring
 * @validity concentric ice
 * @accuracy rounding
 */
export function iceSleeveMass(sleeve: IceSleeve): number {
  assertNumber('diameterM', sleeve.diameterM, { above: 0 });
  assertNumber('iceThicknessM', sleeve.iceThicknessM, { atLeast: 0 });
  assertNumber('iceDensityKgPerM3', sleeve.iceDensityKgPerM3, { above: 0 });
  return sleeve.iceDensityKgPerM3 * Math.PI * sleeve.iceThicknessM * (sleeve.diameterM + sleeve.iceThicknessM);
}

/** Ice and wind on a wire. */
export interface WireLoading extends IceSleeve {
  readonly massKgPerM: number;
  readonly windPressurePa: number;
  /** Constant that some loading rules add to the resultant; 0 when left out. */
  readonly addedLoadNPerM?: number;
}

/** Loads per length, and the swing of the wire's plane from the vertical. */
export interface LineLoad {
  readonly verticalNPerM: number;
  readonly windNPerM: number;
  readonly resultantNPerM: number;
  readonly swingRad: number;
}

/**
 * Vertical, wind and resultant load of an iced wire, and the angle to which the wind swings it.
 *
 * @param loading wire mass [kg/m] > 0, diameter [m], ice thickness [m] and density [kg/m³], wind pressure
 *   p on the iced diameter [Pa] ≥ 0 (drag coefficient included), added load K [N/m] ≥ 0
 * @returns loads [N/m] and swing [rad]; K is in the resultant only
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: √(vertical² + wind²) + K, swing = atan(wind/vertical)
 * @validity wind square to the span, steady
 * @accuracy rounding
 */
export function lineLoad(loading: WireLoading): LineLoad {
  assertNumber('massKgPerM', loading.massKgPerM, { above: 0 });
  assertNumber('windPressurePa', loading.windPressurePa, { atLeast: 0 });
  const addedLoadNPerM = loading.addedLoadNPerM ?? 0;
  assertNumber('addedLoadNPerM', addedLoadNPerM, { atLeast: 0 });
  const verticalNPerM = (loading.massKgPerM + iceSleeveMass(loading)) * gravityMPerS2;
  const windNPerM = loading.windPressurePa * (loading.diameterM + 2 * loading.iceThicknessM);
  return {
    verticalNPerM,
    windNPerM,
    resultantNPerM: Math.hypot(verticalNPerM, windNPerM) + addedLoadNPerM,
    swingRad: Math.atan2(windNPerM, verticalNPerM),
  };
}

/**
 * Dynamic pressure of the wind, ½ρV².
 *
 * @param densityKgPerM3 ρ, air, scalar [kg/m³], > 0
 * @param windSpeedMPerS V, scalar [m/s], ≥ 0
 * @returns pressure, scalar [Pa]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity incompressible flow
 * @accuracy rounding
 */
export function windPressure(densityKgPerM3: number, windSpeedMPerS: number): number {
  assertNumber('densityKgPerM3', densityKgPerM3, { above: 0 });
  assertNumber('windSpeedMPerS', windSpeedMPerS, { atLeast: 0 });
  return (densityKgPerM3 * windSpeedMPerS ** 2) / 2;
}
