import { assertNumber } from '../numerics/assert-number.ts';

/** Roughness length and least height of a terrain. */
export interface TerrainRoughness {
  readonly roughnessM: number;
  readonly leastHeightM: number;
}

/** Terrain categories of the wind code. */
export type TerrainCategory = '0' | 'I' | 'II' | 'III' | 'IV';

/** @source published: EN 1991-1-4:2005, table 4.1, read as quoted */
const roughnesses: Readonly<Record<TerrainCategory, TerrainRoughness>> = {
  '0': { roughnessM: 0.003, leastHeightM: 1 },
  I: { roughnessM: 0.01, leastHeightM: 1 },
  II: { roughnessM: 0.05, leastHeightM: 2 },
  III: { roughnessM: 0.3, leastHeightM: 5 },
  IV: { roughnessM: 1, leastHeightM: 10 },
};

/**
 * Roughness length and least height by terrain category.
 *
 * @param category terrain category
 * @returns z₀ [m] and z_min [m]
 * @source published: EN 1991-1-4:2005, table 4.1, read as quoted
 * @validity neutral wind over uniform terrain
 * @accuracy as printed
 */
export function terrainRoughness(category: TerrainCategory): TerrainRoughness {
  return roughnesses[category];
}

/** Mean wind, turbulence and gust pressure at a height. */
export interface TerrainWind {
  readonly roughnessCoef: number;
  readonly turbulenceIntensityRatio: number;
  readonly gustPressurePa: number;
}

/** @source published: EN 1991-1-4:2005, 4.3.2, read as quoted */
const referenceRoughnessM = 0.05;
/** @source published: EN 1991-1-4:2005, 4.3.2, read as quoted */
const terrainCoef = 0.19;
/** @source published: EN 1991-1-4:2005, 4.3.2, read as quoted */
const terrainExponentNumber = 0.07;
/** Seven, twice the peak factor of 3.5. @source from memory: EN 1991-1-4:2005, expression 4.8 */
const gustFactorNumber = 7;

/**
 * Terrain factor of a roughness length, 0.19·(z₀/0.05)^0.07.
 *
 * @param roughnessM z₀, scalar [m], > 0
 * @returns terrain factor, scalar
 * @throws EngineInputError if the input is outside its bounds
 * @source published: EN 1991-1-4:2005, 4.3.2, read as quoted
 * @validity z₀ from 0.003 to 1 m
 * @accuracy as the code
 */
export function terrainFactor(roughnessM: number): number {
  assertNumber('roughnessM', roughnessM, { above: 0 });
  return terrainCoef * (roughnessM / referenceRoughnessM) ** terrainExponentNumber;
}

/**
 * Wind over flat terrain at a height; below the least height the values are those at it.
 *
 * @param terrain roughness length [m], > 0, and least height [m], above the roughness length
 * @param heightM z, scalar [m], > 0
 * @param basic basic wind speed v_b [m/s], ≥ 0, and air density [kg/m³], > 0
 * @returns roughness coefficient, turbulence intensity [ratio] and gust pressure [Pa]
 * @throws EngineInputError if an input is outside its bounds
 * @source from memory: EN 1991-1-4:2005, 4.3.2 and 4.4 read as quoted, the pressure's expression 4.8 recalled
 * @validity flat terrain, z up to 200 m
 * @accuracy as the code
 */
export function terrainWind(
  terrain: TerrainRoughness,
  heightM: number,
  basic: { readonly windSpeedMPerS: number; readonly densityKgPerM3: number },
): TerrainWind {
  assertNumber('roughnessM', terrain.roughnessM, { above: 0 });
  assertNumber('leastHeightM', terrain.leastHeightM, { above: terrain.roughnessM });
  assertNumber('heightM', heightM, { above: 0 });
  assertNumber('windSpeedMPerS', basic.windSpeedMPerS, { atLeast: 0 });
  assertNumber('densityKgPerM3', basic.densityKgPerM3, { above: 0 });
  const profile = Math.log(Math.max(heightM, terrain.leastHeightM) / terrain.roughnessM);
  const roughnessCoef = terrainFactor(terrain.roughnessM) * profile;
  const turbulenceIntensityRatio = 1 / profile;
  const meanPressurePa = (basic.densityKgPerM3 * (roughnessCoef * basic.windSpeedMPerS) ** 2) / 2;
  return {
    roughnessCoef,
    turbulenceIntensityRatio,
    gustPressurePa: (1 + gustFactorNumber * turbulenceIntensityRatio) * meanPressurePa,
  };
}
