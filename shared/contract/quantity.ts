import { z } from 'zod';

/*
 * Bounds of what a record may hold. They refuse slips of the pen (a tension in kN, a span in feet times ten), not
 * unusual engineering; each is a common-practice bound without a source.
 */
const bounded = ([lower, upper]: readonly [number, number], description: string, example: number) =>
  z
    .number({ error: (issue) => (issue.input === undefined ? 'is required' : 'must be a finite number') })
    .min(lower, `must be at least ${lower}`)
    .max(upper, `must be at most ${upper}`)
    .meta({ description, examples: [example] });

export const spanLengthMSchema = bounded([5, 5000], 'Horizontal span length, m', 350);
export const tensionNSchema = bounded([100, 500_000], 'Horizontal tension at everyday conditions, N', 27757);
export const structureHeightMSchema = bounded([2, 400], 'Height of the wire attachment above ground, m', 24);
export const damperDistanceMSchema = bounded(
  [0.05, 50],
  'Distance of the damper clamp from the last point of contact at the wire clamp, m',
  1.05,
);
export const roughnessMSchema = bounded([0.0001, 3], 'Aerodynamic roughness length z0, m', 0.05);
export const voltageVSchema = bounded([0, 1_500_000], 'Nominal voltage, V', 220_000);
