import { damperNaturalFrequencies } from '../dampers/damper-natural-frequencies.ts';
import type { SpanSetup } from '../span/span-setup.ts';

/** Use of the limit at rising frequencies; −1 where there is no data. */
export interface SearchPoints {
  readonly frequenciesHz: number[];
  readonly utilisations: number[];
}

/** Result of the search between the points of a sweep. */
export interface WorstSearch extends SearchPoints {
  /** Frequency of the worst use, or null if no point has data. */
  readonly worstFrequencyHz: number | null;
  readonly worstUtilisationRatio: number;
  readonly worstErrorRatio: number;
}

/** Use of the limit at given frequencies. */
export type UtilisationOf = (frequenciesHz: Float64Array) => Float64Array;

/** Local maxima below this share of the highest cannot overtake it between two points. @source own model */
const candidateShareRatio = 0.85;
const candidateLimitCount = 4;
const roundLimitCount = 4;
/** The search stops when the parabola through the last three points promises less than this. */
const gainRatio = 1e-5;
/** A step of more than this share between two points gets a point between them. @source own model */
const steepRatio = 0.5;
/** A damper's resonance narrower than this many steps gets points of its own. @source own model */
const narrowStepCount = 4;

/** Points that a sharp resonance of a lightly damped damper needs. */
function resonancePoints(setup: SpanSetup, { frequenciesHz }: SearchPoints): number[] {
  const first = frequenciesHz[0] ?? 0;
  const last = frequenciesHz.at(-1) ?? 0;
  const step = (last - first) / Math.max(frequenciesHz.length - 1, 1);
  const models = setup.ends.flatMap((end) => end.models);
  return models
    .flatMap((model) => (model.kind === 'halves' ? model.halves : []))
    .filter((half) => half.lossRatio * last < narrowStepCount * step * 2)
    .flatMap((half) =>
      damperNaturalFrequencies(half)
        .filter((f) => half.lossRatio * f < narrowStepCount * step)
        .flatMap((f) => [-1, -0.5, 0, 0.5, 1].map((share) => f * (1 + share * half.lossRatio))),
    )
    .filter((f) => f > first && f < last);
}

/** Middles of the steps across which the use of the limit changes much. */
function steepPoints({ frequenciesHz, utilisations }: SearchPoints): number[] {
  const highest = Math.max(...utilisations);
  return frequenciesHz.slice(1).flatMap((f, index) => {
    const before = utilisations[index] ?? 0;
    const after = utilisations[index + 1] ?? 0;
    const larger = Math.max(before, after);
    const isSteep = Math.abs(after - before) > steepRatio * larger && larger > steepRatio * highest;
    return isSteep && Math.min(before, after) >= 0 ? [(f + (frequenciesHz[index] ?? f)) / 2] : [];
  });
}

function withPoints(points: SearchPoints, more: readonly number[], use: UtilisationOf): SearchPoints {
  const known = new Set(points.frequenciesHz);
  const fresh = [...new Set(more)].filter((f) => !known.has(f));
  if (fresh.length === 0) return points;
  const used = use(Float64Array.from(fresh));
  const all = points.frequenciesHz.map((f, index) => [f, points.utilisations[index] ?? -1] as const);
  fresh.forEach((f, index) => all.push([f, used[index] ?? -1]));
  all.sort((a, b) => a[0] - b[0]);
  return { frequenciesHz: all.map(([f]) => f), utilisations: all.map(([, value]) => value) };
}

/** Top of the parabola through a point and its two neighbours. */
function vertex(points: SearchPoints, index: number): { frequencyHz: number; gain: number } | null {
  const [f0, f1, f2] = [points.frequenciesHz[index - 1], points.frequenciesHz[index], points.frequenciesHz[index + 1]];
  const [u0, u1, u2] = [points.utilisations[index - 1], points.utilisations[index], points.utilisations[index + 1]];
  if (f0 === undefined || f1 === undefined || f2 === undefined) return null;
  if (u0 === undefined || u1 === undefined || u2 === undefined || u0 < 0 || u2 < 0) return null;
  const left = (u1 - u0) / (f1 - f0);
  const right = (u2 - u1) / (f2 - f1);
  const bend = (right - left) / (f2 - f0);
  if (!(bend < 0)) return null;
  const slope = (left * (f2 - f1) + right * (f1 - f0)) / (f2 - f0);
  const shift = -slope / (2 * bend);
  const frequencyHz = f1 + shift;
  if (!(frequencyHz > f0 && frequencyHz < f2) || Math.abs(shift) < 1e-9 * f1) return null;
  return { frequencyHz, gain: (-slope * slope) / (4 * bend) };
}

function candidates({ utilisations }: SearchPoints): number[] {
  const highest = Math.max(...utilisations);
  return utilisations
    .map((_, index) => index)
    .filter((index) => {
      const here = utilisations[index] ?? -1;
      const isTop = here >= (utilisations[index - 1] ?? -1) && here >= (utilisations[index + 1] ?? -1);
      return here > 0 && isTop && here >= candidateShareRatio * highest;
    })
    .sort((a, b) => (utilisations[b] ?? 0) - (utilisations[a] ?? 0))
    .slice(0, candidateLimitCount);
}

/**
 * Finds the worst frequency between the points of a sweep: points at sharp resonances of dampers and on steep steps,
 * then the tops of parabolas through the highest points until they promise nothing more.
 *
 * @param setup  span, for the resonances of its dampers
 * @param sweep  frequencies, rising [Hz], and use of the limit [ratio]
 * @param use    use of the limit at further frequencies
 * @returns all points, the worst of them, and the share by which the last parabola still rises above it
 * @source own model: successive parabolic interpolation
 * @validity peaks no narrower than the step, but for resonances of dampers told by their halves
 * @accuracy stated with the result; about 1e-5 of the worst use
 */
export function searchWorst(setup: SpanSetup, sweep: SearchPoints, use: UtilisationOf): WorstSearch {
  let points = withPoints(sweep, resonancePoints(setup, sweep), use);
  points = withPoints(points, steepPoints(points), use);
  let promisedRatio = 0;
  for (let round = 0; round <= roundLimitCount; round += 1) {
    const highest = Math.max(...points.utilisations);
    const tops = candidates(points)
      .map((index) => ({ top: vertex(points, index), here: points.utilisations[index] ?? 0 }))
      .flatMap(({ top, here }) =>
        top !== null && here + top.gain > highest * (1 + gainRatio) ? [{ ...top, here }] : [],
      );
    promisedRatio = tops.reduce((most, { here, gain }) => Math.max(most, (here + gain) / highest - 1), 0);
    if (tops.length === 0 || round === roundLimitCount) break;
    points = withPoints(
      points,
      tops.map((top) => top.frequencyHz),
      use,
    );
  }
  const worstUtilisationRatio = Math.max(...points.utilisations);
  const worstIndex = points.utilisations.indexOf(worstUtilisationRatio);
  return {
    ...points,
    worstFrequencyHz: worstUtilisationRatio < 0 ? null : (points.frequenciesHz[worstIndex] ?? null),
    worstUtilisationRatio,
    worstErrorRatio: Math.max(promisedRatio, gainRatio),
  };
}
