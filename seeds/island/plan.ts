import { kilometres, type Anchor, type Place } from './plane.ts';

/** Everything here is invented for the demo: no such island, utility or line exists. */
export interface LinePlan {
  readonly name: string;
  readonly voltageKV: number;
  readonly via: readonly Place[];
  readonly conductor: string;
  readonly conductorStandard: string;
  /** As the catalogue of the seeds has it. */
  readonly ratedStrengthN: number;
  /** Everyday tension over rated strength: the lowest of its sections, and how much the others may lie above it. */
  readonly tensionRatio: number;
  readonly tensionSpreadRatio: number;
  readonly hasEarthWire: boolean;
}

export interface ZonePlan {
  readonly name: string;
  readonly roughnessM: number;
  readonly centre: Place;
  readonly halfWidthM: number;
  readonly halfHeightM: number;
}

export interface IslandPlan {
  readonly seed: number;
  readonly anchor: Anchor;
  readonly lines: readonly LinePlan[];
  readonly zones: readonly ZonePlan[];
}

const brazilian = 'ABNT NBR 7270';
const alloy = 'ASTM B399 (inch)';
const portTern = kilometres(-24, -6);
const midmoor = kilometres(0, 0);
const eastness = kilometres(25, 2);
const lakeAster = kilometres(2, 9);
const westhead = kilometres(-27, 4);
const southBay = kilometres(8, -13);
const lanternPoint = kilometres(26, -7);
const northSkerry = kilometres(10, 14);
const quarry = kilometres(-10, 9);
const sandhaven = kilometres(-19, -9.5);

type Strung = Pick<LinePlan, 'conductor' | 'conductorStandard' | 'ratedStrengthN'>;
const drake: Strung = { conductor: 'Drake', conductorStandard: brazilian, ratedStrengthN: 139_700 };
const hawk: Strung = { conductor: 'Hawk', conductorStandard: brazilian, ratedStrengthN: 87_180 };
const linnet: Strung = { conductor: 'Linnet', conductorStandard: brazilian, ratedStrengthN: 62_910 };
const butte: Strung = { conductor: 'Butte', conductorStandard: alloy, ratedStrengthN: 48_930 };

type Course = Pick<LinePlan, 'name' | 'via'>;
function line(course: Course, strung: Strung, values: readonly [number, number, number]): LinePlan {
  const [voltageKV, tensionRatio, tensionSpreadRatio] = values;
  return { ...course, ...strung, voltageKV, tensionRatio, tensionSpreadRatio, hasEarthWire: voltageKV > 50 };
}

export const ternIsland: IslandPlan = {
  seed: 1901,
  anchor: { longitudeDeg: -21, latitudeDeg: -38.5 },
  zones: [
    { name: 'Tern Island heath', roughnessM: 0.05, centre: kilometres(0, 0), halfWidthM: 32_000, halfHeightM: 18_500 },
    { name: 'Port Tern', roughnessM: 0.7, centre: kilometres(-23, -6.5), halfWidthM: 2800, halfHeightM: 2200 },
    { name: 'Aster wood', roughnessM: 0.8, centre: kilometres(-4, 7.5), halfWidthM: 4200, halfHeightM: 2600 },
    { name: 'Lake Aster', roughnessM: 0.0005, centre: kilometres(4, 10.5), halfWidthM: 2400, halfHeightM: 1300 },
    { name: 'Eastness meadows', roughnessM: 0.015, centre: kilometres(20, 1), halfWidthM: 7500, halfHeightM: 5200 },
    { name: 'Westhead grassland', roughnessM: 0.01, centre: kilometres(-25, 2), halfWidthM: 5200, halfHeightM: 4200 },
    { name: 'South Bay flats', roughnessM: 0.003, centre: kilometres(14, -12), halfWidthM: 8000, halfHeightM: 2800 },
  ],
  lines: [
    line(
      { name: 'Port Tern–Midmoor 1', via: [portTern, kilometres(-15, -3), kilometres(-6, -2.2), midmoor] },
      drake,
      [220, 0.19, 0.015],
    ),
    line(
      { name: 'Port Tern–Midmoor 2', via: [portTern, kilometres(-15, -3.8), kilometres(-6, -3), midmoor] },
      drake,
      [220, 0.19, 0.015],
    ),
    line(
      { name: 'Midmoor–Eastness', via: [midmoor, kilometres(7, 1.5), kilometres(16, 0.6), eastness] },
      drake,
      [220, 0.22, 0.025],
    ),
    line({ name: 'Lake Aster–Midmoor', via: [lakeAster, kilometres(1.4, 4.6), midmoor] }, drake, [220, 0.18, 0.01]),
    line({ name: 'Westhead–Port Tern', via: [westhead, kilometres(-27.4, -1), portTern] }, hawk, [110, 0.21, 0.02]),
    line({ name: 'Midmoor–South Bay', via: [midmoor, kilometres(2.6, -5.5), southBay] }, hawk, [110, 0.18, 0.02]),
    line(
      { name: 'South Bay–Lantern Point', via: [southBay, kilometres(14, -12.4), kilometres(20.5, -9), lanternPoint] },
      hawk,
      [110, 0.235, 0.015],
    ),
    line(
      { name: 'Eastness–Lantern Point', via: [eastness, kilometres(26.8, -2), lanternPoint] },
      linnet,
      [110, 0.2, 0.02],
    ),
    line({ name: 'Quarry–Midmoor', via: [quarry, kilometres(-5, 5.8), midmoor] }, linnet, [110, 0.17, 0.02]),
    line(
      { name: 'North Skerry–Lake Aster', via: [northSkerry, kilometres(6.8, 12.4), lakeAster] },
      linnet,
      [110, 0.21, 0.03],
    ),
    line({ name: 'Westhead–Quarry', via: [westhead, kilometres(-20, 7.4), quarry] }, hawk, [110, 0.16, 0.02]),
    line({ name: 'Port Tern–Sandhaven', via: [portTern, kilometres(-21.6, -8.2), sandhaven] }, butte, [33, 0.16, 0.01]),
  ],
};

const northRock = kilometres(-6, 4);
const skuaTown = kilometres(0, 0);
const farRock = kilometres(7, -3);

export const skuaIsland: IslandPlan = {
  seed: 77,
  anchor: { longitudeDeg: -24.5, latitudeDeg: -38.9 },
  zones: [
    { name: 'Skua moor', roughnessM: 0.03, centre: kilometres(0, 0), halfWidthM: 11_000, halfHeightM: 7000 },
    { name: 'Skua town', roughnessM: 0.6, centre: kilometres(0.3, -0.4), halfWidthM: 1200, halfHeightM: 900 },
  ],
  lines: [
    line({ name: 'North Rock–Skua Town', via: [northRock, kilometres(-3, 2.6), skuaTown] }, linnet, [66, 0.2, 0.02]),
    line({ name: 'Skua Town–Far Rock', via: [skuaTown, kilometres(3.6, -1), farRock] }, linnet, [66, 0.18, 0.02]),
  ],
};

/** Earth wire of every line that has one. */
export const earthWire = {
  conductor: 'SC/GZ 7/3.25',
  conductorStandard: 'AS 1222.1',
  ratedStrengthN: 68_700,
  tensionRatio: 0.13,
};

/** A branch of which only the course is known: it is imported as a centre line, so everything in it is assumed. */
export interface BranchPlan {
  readonly name: string;
  readonly voltageKV: number;
  readonly parts: readonly (readonly Place[])[];
}

const knoll = kilometres(-1.5, 12.2);
export const branchCourse: BranchPlan = {
  name: 'Quarry–Skerry branch',
  voltageKV: 33,
  parts: [
    [quarry, kilometres(-6.2, 11), knoll],
    [knoll, kilometres(4.2, 14.6), northSkerry],
  ],
};

/** Lines for people to try the import with; the demo does not hold them. */
export const sampleLine = line(
  { name: 'Sandhaven–Cape Flint', via: [sandhaven, kilometres(-14.5, -12.2), kilometres(-9, -12.6)] },
  hawk,
  [110, 0.2, 0.01],
);
export const sampleBranch: BranchPlan = {
  name: 'Cape Flint branch',
  voltageKV: 33,
  parts: [
    [kilometres(-9, -12.6), kilometres(-6.4, -11.4)],
    [kilometres(-6.4, -11.4), kilometres(-3, -12.2), kilometres(-1.2, -11)],
  ],
};
