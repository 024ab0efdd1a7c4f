import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

/** Share of time and Weibull distribution of the wind that comes from one direction. */
export interface ClimateSector {
  /** Direction the wind comes from, from true north. */
  readonly directionRad: number;
  readonly shareRatio: number;
  readonly weibullScaleMPerS: number;
  readonly weibullShapeNumber: number;
}

/** Wind climate by direction sectors. */
export interface WindClimate {
  readonly sectors: readonly ClimateSector[];
}

/** @source common practice: bounds that refuse slips of the pen */
const sectorLimits = {
  directionRad: { atLeast: -2 * Math.PI, atMost: 4 * Math.PI },
  shareRatio: { atLeast: 0, atMost: 1 },
  weibullScaleMPerS: { above: 0, atMost: 60 },
  weibullShapeNumber: { atLeast: 0.3, atMost: 20 },
} as const;
const sectorLimitCount = 360;
/** Published shares are rounded. */
const shareSumLimitRatio = 1.01;

/**
 * Refuses a climate that cannot be.
 *
 * @param climate direction sectors
 * @throws EngineInputError naming the sector and field; shares that add up to more than 1
 * @source common practice
 */
export function assertWindClimate(climate: WindClimate): void {
  const { sectors } = climate;
  if (sectors.length < 1 || sectors.length > sectorLimitCount) {
    throw new EngineInputError('climate.sectors', `must be 1 to ${sectorLimitCount} sectors`);
  }
  sectors.forEach((sector, index) => {
    for (const [key, limits] of Object.entries(sectorLimits)) {
      const path = `climate.sectors[${index}].${key}`;
      assertNumber(path, sector[key as keyof ClimateSector], limits); // keys of the table are keys of a sector
    }
  });
  const sum = sectors.reduce((total, sector) => total + sector.shareRatio, 0);
  if (sum > shareSumLimitRatio)
    throw new EngineInputError('climate.sectors', `have shares that add up to ${sum}, above 1`);
}
