import { describe, expect, it } from 'vitest';
import {
  assessSpanWire,
  EngineInputError,
  searchPlacements,
  type DamperModel,
  type PlacementResult,
  type PlacementTask,
} from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceDamper } from './engine-cases.ts';

const scaled = (factor: number): DamperModel => {
  if (referenceDamper.kind !== 'halves') throw new Error('the reference damper is told by its halves');
  const halves = referenceDamper.halves.map((half) => ({
    ...half,
    massKg: half.massKg * factor,
    inertiaKgM2: half.inertiaKgM2 * factor,
  }));
  return { ...referenceDamper, halves };
};

const task = (parts: Partial<PlacementTask> = {}): PlacementTask => ({
  input: aSpanWire({ ends: [endWith(), endWith()] }),
  basis: aBasis({ damperedStrain: { strainRatio: 150e-6, convention: 'peak-to-peak', source: 'test' } }),
  catalogue: [
    { name: 'small', model: scaled(0.6) },
    { name: 'large', model: scaled(1.4) },
  ],
  damperLimitCount: 2,
  distance: { lowerM: 0.4, upperM: 2.5, stepM: 0.01 },
  toleranceM: 0.03,
  tensionsN: [25_000, 30_000],
  ...parts,
});

function run(given: PlacementTask): PlacementResult {
  const search = searchPlacements(given);
  let step = search.next();
  while (step.done !== true) step = search.next();
  return step.value;
}

describe('searching placements', () => {
  const found = run(task());

  it('offers the best choice for each number of dampers, fewest first, each better than the one before', () => {
    expect(found.choices.map((choice) => choice.damperCount)).toEqual([0, 1, 2]);
    const worst = found.choices.map((choice) => choice.worstUtilisationRatio);
    expect(worst[1]).toBeLessThan(worst[0] ?? NaN);
    expect(worst[2]).toBeLessThan(worst[1] ?? NaN);
  });

  it('reports what the full assessment says of the plan', () => {
    const choice = found.choices[1];
    const dampers = (choice?.dampers ?? []).map(({ catalogueIndex, distanceM }) => ({
      distanceM,
      model: scaled(catalogueIndex === 0 ? 0.6 : 1.4),
    }));
    const used = [25_000, 30_000].map((tensionN) => {
      const input = aSpanWire({ ends: [{ dampers }, { dampers }], span: { lengthM: 350, tensionN, bearingRad: 0.3 } });
      return assessSpanWire(input, task().basis).worst?.utilisationRatio ?? NaN;
    });
    expect(choice?.plannedUtilisationRatio).toBeCloseTo(Math.max(...used), 10);
    expect(choice?.worstUtilisationRatio).toBeGreaterThanOrEqual(choice?.plannedUtilisationRatio ?? NaN);
  });

  it('comes within 3 % of the best of every single place, tried one by one', () => {
    const single = task({ damperLimitCount: 1, toleranceM: 0, tensionsN: [27_757] });
    const choice = run(single).choices[1];
    let best = Infinity;
    for (const { model } of single.catalogue) {
      for (let step = 0; step <= 210; step += 1) {
        const end = { dampers: [{ distanceM: 0.4 + 0.01 * step, model }] };
        const used = assessSpanWire(aSpanWire({ ends: [end, end] }), single.basis).worst?.utilisationRatio ?? NaN;
        best = Math.min(best, used);
      }
    }
    expect((choice?.worstUtilisationRatio ?? NaN) / best).toBeLessThan(1.03);
  });

  it('gives the same result every time', () => {
    expect(run(task())).toEqual(found);
  });

  it('tells its progress and can be left at any step', () => {
    const search = searchPlacements(task());
    const first = search.next();
    const second = search.next();
    if (first.done === true || second.done === true) throw new Error('the search ends too soon');
    expect(first.value.doneRatio).toBeGreaterThan(0);
    expect(second.value.trialCount).toBeGreaterThan(first.value.trialCount);
    search.return({ choices: [], trialCount: 0, methods: [] });
    expect(search.next().done).toBe(true);
  });

  it.each([
    ['catalogue', { catalogue: [] }],
    ['damperLimitCount', { damperLimitCount: 4 }],
    ['distance.upperM', { distance: { lowerM: 1, upperM: 0.5, stepM: 0.01 } }],
    ['tensionsN', { tensionsN: [] }],
    ['toleranceM', { toleranceM: 0.4 }],
  ])('refuses %s out of bounds', (path, parts) => {
    const refused = (() => {
      try {
        run(task(parts));
        return null;
      } catch (error) {
        return error;
      }
    })();
    if (!(refused instanceof EngineInputError)) throw new Error('it was taken');
    expect(refused.path).toBe(path);
  });
});
