import { aside, between, distanceM, turnAtDeg, type Place } from './plane.ts';
import type { LinePlan } from './plan.ts';
import { createRandom } from './random.ts';

export interface DrawnStructure {
  readonly name: string;
  readonly order: number;
  readonly place: Place;
  readonly kind: 'dead-end' | 'suspension';
  readonly structureHeightM: number;
  readonly groundElevationM: number;
}

export interface DrawnSection {
  readonly fromStructure: string;
  readonly toStructure: string;
  readonly tensionRatio: number;
}

export interface DrawnLine {
  readonly structures: readonly DrawnStructure[];
  readonly sections: readonly DrawnSection[];
}

type Random = () => number;

/** Usual span and attachment height by voltage, as such lines are built. */
function usual(voltageKV: number): { spanM: number; heightM: number } {
  if (voltageKV >= 200) return { spanM: 350, heightM: 27 };
  if (voltageKV >= 60) return { spanM: 275, heightM: 20 };
  return { spanM: 150, heightM: 12 };
}

const stationRadiusM = 90;
const longestSectionSpanCount = 13;
const deadEndFromTurnDeg = 12;
/** Rounded to a step, without the dust of binary fractions. */
const shown = (value: number, step: number) => Number((Math.round(value / step) * step).toFixed(2));

/** Ground above the sea: three invented hills, so that neighbours differ little. */
function groundM({ eastM, northM }: Place): number {
  const hill = (topM: number, [eastKm, northKm, widthKm]: readonly [number, number, number]) =>
    topM * Math.exp(-((eastM / 1000 - eastKm) ** 2 + (northM / 1000 - northKm) ** 2) / widthKm ** 2);
  return 12 + hill(310, [-4, 5, 8]) + hill(180, [14, -3, 7]) + hill(140, [-18, 1, 6]);
}

/** A course that begins and ends a little outside its stations, where the lines of a station do not stand in one place. */
function outsideStations(via: readonly Place[]): Place[] {
  const course = [...via];
  const [first, second] = via;
  const [last, former] = via.toReversed();
  if (first === undefined || second === undefined || last === undefined || former === undefined) return course;
  course[0] = between(first, second, stationRadiusM / distanceM(first, second));
  course[course.length - 1] = between(last, former, stationRadiusM / distanceM(last, former));
  return course;
}

/** A course with a few slight bends between its fixed points. */
function bend(via: readonly Place[], random: Random): Place[] {
  return via.flatMap((to, index) => {
    const from = via[index - 1];
    if (from === undefined) return [to];
    const isLong = distanceM(from, to) > 5000;
    const middle = aside(
      between(from, to, 0.35 + 0.3 * random()),
      [from, to],
      distanceM(from, to) * 0.06 * (random() - 0.5),
    );
    return isLong ? [middle, to] : [to];
  });
}

function divideLeg([from, to]: readonly [Place, Place], spanM: number, random: Random): Place[] {
  const spanCount = Math.max(1, Math.round(distanceM(from, to) / spanM));
  const weights = Array.from({ length: spanCount }, () => (random() < 0.06 ? 1.7 : 0.78 + 0.44 * random()));
  const all = weights.reduce((sum, weight) => sum + weight, 0);
  let done = 0;
  return weights.map((weight) => {
    done += weight;
    return between(from, to, done / all);
  });
}

function placesOf(plan: LinePlan, random: Random): { place: Place; isSharp: boolean }[] {
  const course = bend(outsideStations(plan.via), random);
  return course.flatMap((to, index) => {
    const from = course[index - 1];
    if (from === undefined) return [{ place: to, isSharp: true }];
    const next = course[index + 1];
    const isSharp = next === undefined || turnAtDeg(from, to, next) > deadEndFromTurnDeg;
    const leg = divideLeg([from, to], usual(plan.voltageKV).spanM, random);
    return leg.map((place, step) => ({ place, isSharp: isSharp && step === leg.length - 1 }));
  });
}

function sectionsOf(structures: readonly DrawnStructure[], plan: LinePlan, random: Random): DrawnSection[] {
  const ends = structures.filter(({ kind }) => kind === 'dead-end');
  return ends.slice(1).flatMap((end, index) => {
    const start = ends[index];
    const tensionRatio = plan.tensionRatio + plan.tensionSpreadRatio * random();
    return start === undefined ? [] : [{ fromStructure: start.name, toStructure: end.name, tensionRatio }];
  });
}

/** Structures and sections of an invented line: uneven spans, dead-ends at sharp turns and after a dozen spans. */
export function drawLine(plan: LinePlan, seed: number): DrawnLine {
  const random = createRandom(seed);
  const { heightM } = usual(plan.voltageKV);
  const places = placesOf(plan, random);
  let sinceDeadEndCount = 0;
  const structures = places.map(({ place, isSharp }, index): DrawnStructure => {
    sinceDeadEndCount += 1;
    const isDeadEnd = isSharp || sinceDeadEndCount > longestSectionSpanCount;
    if (isDeadEnd) sinceDeadEndCount = 0;
    return {
      name: String(index + 1),
      order: index + 1,
      place,
      kind: isDeadEnd ? 'dead-end' : 'suspension',
      structureHeightM: shown(heightM * (0.88 + 0.24 * random()), 0.1),
      groundElevationM: shown(groundM(place), 1),
    };
  });
  return { structures, sections: sectionsOf(structures, plan, random) };
}
