import { assessSpanWire } from '../assessment/assess-span-wire.ts';
import { assertDamperModel } from '../dampers/assert-damper-model.ts';
import { methodEntry, methodNote } from '../methods/method-registry.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { PlacementChoice, PlacementProgress, PlacementResult, PlacementTask } from './placement-types.ts';
import {
  fittedVariants,
  placementTrials,
  robustUtilisation,
  trialRows,
  trialUtilisation,
  type PlacementTrials,
  type TrialDamper,
} from './placement-trials.ts';

/** Numbers of the search. @source own model: wide first look, then the best few by steps of falling size */
const firstLook = { single: 60, pair: 15 } as const;
const keptCount = 4;
const damperLimit = 3;
const catalogueLimit = 20;
const tensionLimit = 6;
const apartM = 0.2;
/** Distances are given to the micrometre: sums of steps carry rounding in their last digits. */
const perRounding = 1e6;
/** Fewer dampers do as well if more improve the worst use by less than this. @source own model */
const worthwhileRatio = 0.02;

interface Ranked {
  readonly dampers: readonly TrialDamper[];
  readonly utilisation: number;
}

function assertTask(task: PlacementTask): void {
  const { catalogue, damperLimitCount, distance, toleranceM, tensionsN, input } = task;
  if (catalogue.length < 1 || catalogue.length > catalogueLimit) {
    throw new EngineInputError('catalogue', `must be 1 to ${catalogueLimit} dampers`);
  }
  catalogue.forEach(({ model }, index) => assertDamperModel(model, `catalogue[${index}].model`));
  assertNumber('damperLimitCount', damperLimitCount, { atLeast: 0, atMost: damperLimit });
  if (!Number.isInteger(damperLimitCount)) throw new EngineInputError('damperLimitCount', 'must be a whole number');
  assertNumber('distance.lowerM', distance.lowerM, { atLeast: 0.05 });
  assertNumber('distance.upperM', distance.upperM, {
    above: distance.lowerM,
    atMost: Math.min(30, input.span.lengthM / 4),
  });
  assertNumber('distance.stepM', distance.stepM, { atLeast: 0.001, atMost: 1 });
  assertNumber('toleranceM', toleranceM, { atLeast: 0, atMost: Math.min(0.5, distance.lowerM / 2) });
  if (tensionsN.length < 1 || tensionsN.length > tensionLimit) {
    throw new EngineInputError('tensionsN', `must be 1 to ${tensionLimit} tensions`);
  }
}

const isApart = (dampers: readonly TrialDamper[]) =>
  dampers.every((damper, index) =>
    dampers.slice(index + 1).every((other) => Math.abs(damper.distanceM - other.distanceM) >= apartM - 1e-9),
  );

function better(ranked: readonly Ranked[], limitCount: number): Ranked[] {
  return [...ranked].sort((a, b) => a.utilisation - b.utilisation).slice(0, limitCount);
}

/** Places on the grid of steps, thinned to about a number. */
function places({ distance }: PlacementTask, count: number): number[] {
  const stepCount = Math.floor((distance.upperM - distance.lowerM) / distance.stepM + 1e-9);
  const stride = Math.max(1, Math.floor(stepCount / count));
  return Array.from(
    { length: Math.floor(stepCount / stride) + 1 },
    (_, index) => distance.lowerM + index * stride * distance.stepM,
  );
}

/** Moves dampers one at a time by halving strides while the worst use over the tolerance falls. */
function refine(trials: PlacementTrials, start: Ranked): Ranked {
  const { distance } = trials.task;
  let best: Ranked = { dampers: start.dampers, utilisation: robustUtilisation(trials, start.dampers) };
  let stride = 8;
  while (stride >= 1) {
    const moved = best.dampers.flatMap((damper, index) =>
      [-1, 1].map((way) => {
        const distanceM = damper.distanceM + way * stride * distance.stepM;
        return best.dampers.map((other, place) => (place === index ? { ...damper, distanceM } : other));
      }),
    );
    const isInside = ({ distanceM }: TrialDamper) =>
      distanceM >= distance.lowerM - 1e-9 && distanceM <= distance.upperM + 1e-9;
    const tried = moved
      .filter((dampers) => dampers.every(isInside) && isApart(dampers))
      .map((dampers) => ({ dampers, utilisation: robustUtilisation(trials, dampers) }));
    const [winner] = better(tried, 1);
    if (winner !== undefined && winner.utilisation < best.utilisation) best = winner;
    else stride = Math.floor(stride / 2);
  }
  return best;
}

/** Every way to add one damper of the catalogue at a place to a plan, beyond its last damper or between. */
function* extensions(trials: PlacementTrials, from: readonly TrialDamper[], placeCount: number): Generator<Ranked> {
  const { task } = trials;
  for (let catalogueIndex = 0; catalogueIndex < task.catalogue.length; catalogueIndex += 1) {
    for (const distanceM of places(task, placeCount)) {
      const dampers = [...from, { catalogueIndex, distanceM }];
      if (isApart(dampers)) yield { dampers, utilisation: trialUtilisation(trials, dampers) };
    }
  }
}

/** First look at every pair; more dampers are added to the best plans with one fewer. */
function* starts(trials: PlacementTrials, before: readonly Ranked[], count: number): Generator<Ranked> {
  if (count === 1) yield* extensions(trials, [], firstLook.single);
  else if (count === 2) {
    for (let catalogueIndex = 0; catalogueIndex < trials.task.catalogue.length; catalogueIndex += 1) {
      for (const distanceM of places(trials.task, firstLook.pair)) {
        yield* extensions(trials, [{ catalogueIndex, distanceM }], firstLook.pair);
      }
    }
  }
  for (const { dampers } of before) if (count > 1) yield* extensions(trials, dampers, firstLook.single);
}

/** Worst use of a limit by the full assessment, over tensions and fitting variants. */
function assessed(task: PlacementTask, variants: readonly (readonly TrialDamper[])[]) {
  let worst = { utilisationRatio: 0, stressPa: 0 };
  for (const variant of variants) {
    const dampers = variant.map(({ catalogueIndex, distanceM }) => {
      const found = task.catalogue[catalogueIndex];
      if (found === undefined) throw new RangeError('a planned damper is in the catalogue');
      return { distanceM, model: found.model };
    });
    for (const tensionN of task.tensionsN) {
      const span = { ...task.input.span, tensionN };
      const ends = [{ dampers }, { dampers }] as const;
      const result = assessSpanWire({ ...task.input, span, ends }, { ...task.basis, climate: null });
      if (result.worst !== null && result.worst.utilisationRatio > worst.utilisationRatio) worst = result.worst;
    }
  }
  return worst;
}

function choiceOf(
  trials: PlacementTrials,
  dampers: readonly TrialDamper[],
  fewer: PlacementChoice | undefined,
): PlacementChoice {
  const { task } = trials;
  const rounded = dampers.map((damper) => ({
    ...damper,
    distanceM: Math.round(damper.distanceM * perRounding) / perRounding,
  }));
  const sorted = rounded.sort((a, b) => a.distanceM - b.distanceM);
  const worst = assessed(task, fittedVariants(sorted, task.toleranceM));
  const planned = assessed(task, [sorted]);
  const needed = fewer === undefined ? Infinity : fewer.worstUtilisationRatio * (1 - worthwhileRatio);
  return {
    damperCount: sorted.length,
    dampers: sorted.map(({ catalogueIndex, distanceM }) => ({
      catalogueIndex,
      name: task.catalogue[catalogueIndex]?.name ?? '',
      distanceM,
    })),
    worstUtilisationRatio: worst.utilisationRatio,
    worstStressPa: worst.stressPa,
    plannedUtilisationRatio: planned.utilisationRatio,
    isWorthwhile: worst.utilisationRatio < needed,
    reasons: trialRows(trials, sorted),
  };
}

/**
 * Searches dampers and distances, the same at both ends, for the smallest worst use of the limits over frequencies,
 * tensions and fitting tolerance, for each number of dampers per end.
 *
 * A generator, so that the caller can show progress and stop between two steps; it gives the same result every time.
 *
 * @param task span wire, limits, catalogue [1–20], dampers per end 0–3, distances, tolerance [m], tensions [1–6] [N]
 * @returns best choice for each number of dampers, with absorption against frequency; yields progress
 * @throws EngineInputError naming the field
 * @source own model: a look over the grid, then steps of falling size from the best few; choices assessed in full
 * @validity both ends alike; a search, no proof that nothing better exists
 * @accuracy distances to the step; uses of the limit as assessSpanWire
 */
export function* searchPlacements(task: PlacementTask): Generator<PlacementProgress, PlacementResult> {
  assertTask(task);
  const trials = placementTrials(task);
  const choices: PlacementChoice[] = [choiceOf(trials, [], undefined)];
  let before: Ranked[] = [];
  for (let count = 1; count <= task.damperLimitCount; count += 1) {
    let ranked: Ranked[] = [];
    let seenCount = 0;
    for (const trial of starts(trials, before, count)) {
      ranked.push(trial);
      seenCount += 1;
      if (seenCount % 100 !== 0) continue;
      ranked = better(ranked, keptCount * task.catalogue.length);
      yield { doneRatio: (count - 0.5) / (task.damperLimitCount + 1), trialCount: trials.trialCount };
    }
    const refined: Ranked[] = [];
    for (const start of better(ranked, keptCount)) {
      refined.push(refine(trials, start));
      yield { doneRatio: count / (task.damperLimitCount + 1), trialCount: trials.trialCount };
    }
    before = better(refined, keptCount);
    const [best] = before;
    if (best !== undefined)
      choices.push(choiceOf(trials, best.dampers, choices.filter((choice) => choice.isWorthwhile).at(-1)));
  }
  return {
    choices,
    trialCount: trials.trialCount,
    methods: [methodNote(methodEntry('fixed', 'placement-search'))],
  };
}
