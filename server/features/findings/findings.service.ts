import type { Finding, FindingSeries } from '#shared/contract/findings.ts';
import {
  ENGINE_VERSION,
  spanWireProfile,
  spanWireSeries,
  type SpanSeriesRow,
  type SpanWireCase,
  type VibrationBasis,
} from '#shared/engine/index.ts';
import type { Actor } from '#server/data/database.ts';
import { engineBasisOf, engineCaseOf, limitsOf } from '#server/data/engine-case.ts';
import { readFinding } from '#server/data/findings.read-model.ts';
import type { FrozenCase } from '#server/data/frozen-input.ts';
import { notFound } from '#server/platform/errors.ts';
import type { Deps } from '../deps.ts';

const profilePointCount = 241;

function rowOf(row: SpanSeriesRow): FindingSeries['rows'][number] {
  return {
    frequencyHz: row.frequencyHz,
    windSpeedMPerS: row.windSpeedMPerS,
    outcome: row.outcome,
    midAmplitudeM: row.midAmplitudeM,
    clampStressPa: [...row.clampStressPa],
    reflectionRatio: [...row.endReflectionRatio],
    windPowerW: row.windPowerW,
    selfDampingPowerW: row.selfDampingPowerW,
    endPowerW: [...row.endPowerW],
  };
}

/** Frequency of the highest clamp stress among rows that have a profile; an amplitude at its limit has none. */
function worstSteadyHz(rows: readonly SpanSeriesRow[]): number | null {
  const steady = rows.filter(({ outcome }) => outcome === 'steady');
  const stressOf = (row: SpanSeriesRow) => Math.max(row.clampStressPa[0] ?? 0, row.clampStressPa[1] ?? 0);
  const worst = steady.reduce<SpanSeriesRow | null>(
    (top, row) => (top === null || stressOf(row) > stressOf(top) ? row : top),
    null,
  );
  return worst?.frequencyHz ?? null;
}

type ProfileAt = (frequencyHz: number | null) => FindingSeries['profile'];
function profileReader(input: SpanWireCase, basis: VibrationBasis): ProfileAt {
  return (frequencyHz) => {
    if (frequencyHz === null) return null;
    const { outcome, ...profile } = spanWireProfile(input, basis, { frequencyHz, pointCount: profilePointCount });
    return outcome === 'steady' ? profile : null;
  };
}

function seriesOf(finding: Finding, frozen: FrozenCase, frequencyHz: number | null): FindingSeries {
  const limits = limitsOf(frozen);
  const shared = {
    findingId: finding.id,
    limitStressPa: limits.enduranceStressPa,
    limitSource: limits.enduranceSource,
    damperedLimitStressPa: limits.damperedStressPa,
    isReproduced: finding.engineVersion === ENGINE_VERSION,
  };
  if (finding.outcome === 'refused') return { ...shared, rows: [], profile: null };
  const input = engineCaseOf(frozen);
  const basis = engineBasisOf(frozen);
  const { rows } = spanWireSeries(input, basis);
  const profileAt = profileReader(input, basis);
  // A frequency that was asked for is answered as it is; the default one must have something to show.
  const profile =
    frequencyHz === null ? (profileAt(finding.frequencyHz) ?? profileAt(worstSteadyHz(rows))) : profileAt(frequencyHz);
  return { ...shared, rows: rows.map(rowOf), profile };
}

export const findingService = ({ database }: Pick<Deps, 'database'>) => {
  const read = async (actor: Actor, findingId: string) => {
    const found = await database.withUtility(actor, (tx) => readFinding(tx, findingId));
    if (found === null) throw notFound('finding', findingId);
    return found;
  };
  return {
    getFinding: async (actor: Actor, findingId: string): Promise<Finding> => (await read(actor, findingId)).finding,
    getSeries: async (actor: Actor, findingId: string, frequencyHz: number | null): Promise<FindingSeries> => {
      const { finding, frozen } = await read(actor, findingId);
      return seriesOf(finding, frozen, frequencyHz);
    },
  };
};
