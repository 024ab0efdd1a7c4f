import { spanMethodNotes, spanWarnings } from '../span/span-notes.ts';
import { spanRows } from '../span/span-rows.ts';
import type { EndPair, SpanRow } from '../span/span-row.ts';
import type { SpanSetup } from '../span/span-setup.ts';
import { windGridFrequencies } from '../wind/wind-grid.ts';
import type {
  EndSeriesRow,
  SpanSeriesRow,
  SpanWireCase,
  SpanWireSeries,
  VibrationBasis,
} from './span-wire-assessment.ts';
import { endLimit } from './stress-places.ts';
import { caseSetup } from './wind-sweep.ts';

/** Worst use of a limit in one row, over the clamps and damper clamps of both ends. */
function utilisationOf(setup: SpanSetup, basis: VibrationBasis, row: SpanRow): number | null {
  if (row.outcome === 'no-damper-data') return null;
  const modulusPa = setup.wire.outerStrandModulusPa;
  return ([0, 1] as const).reduce<number>((most, end) => {
    const damperStrains = row.damperClampStrainRatio[end];
    const limit = endLimit(basis, { damperCount: damperStrains.length, modulusPa });
    const strain = Math.max(row.clampStrainRatio[end] ?? 0, ...damperStrains.map((value) => value ?? 0));
    return Math.max(most, (strain * modulusPa) / limit.stressPa);
  }, 0);
}

function seriesRow(setup: SpanSetup, basis: VibrationBasis, row: SpanRow): SpanSeriesRow {
  const stress = (end: 0 | 1) => {
    const strain = row.clampStrainRatio[end];
    return strain === null ? null : strain * setup.wire.outerStrandModulusPa;
  };
  return { ...row, clampStressPa: [stress(0), stress(1)], utilisationRatio: utilisationOf(setup, basis, row) };
}

/** Reflection of an end with the shares that follow from it. */
export function endSeriesRow(frequencyHz: number, reflectionRatio: number | null): EndSeriesRow {
  if (reflectionRatio === null) return { frequencyHz, reflectionRatio, absorbedRatio: null, iswRatio: null };
  return {
    frequencyHz,
    reflectionRatio,
    absorbedRatio: 1 - reflectionRatio ** 2,
    iswRatio: (1 - reflectionRatio) / (1 + reflectionRatio),
  };
}

/**
 * The full sweep over the wind band of a basis, row by row, for charts.
 *
 * @param input case of one span wire
 * @param basis wind band, methods and limits
 * @returns rows and end responses at each frequency of the band, methods and warnings
 * @throws EngineInputError naming the field for input that cannot be
 * @source closed form on the chosen methods
 * @validity see `warnings`
 * @accuracy see solveSpanBalance; the worst frequency may lie between two rows, assessSpanWire finds it
 */
export function spanWireSeries(input: SpanWireCase, basis: VibrationBasis): SpanWireSeries {
  const setup = caseSetup(input, basis);
  const { diameterM } = setup.wire;
  const frequenciesHz = windGridFrequencies(basis, { diameterM, strouhalNumber: setup.methods.strouhalNumber });
  const { rows, sweep } = spanRows(setup, frequenciesHz);
  const endRows = (end: 0 | 1) => rows.map((row) => endSeriesRow(row.frequencyHz, row.endReflectionRatio[end]));
  const ends: EndPair<EndSeriesRow[]> = [endRows(0), endRows(1)];
  return {
    rows: rows.map((row) => seriesRow(setup, basis, row)),
    ends,
    methods: spanMethodNotes(setup),
    warnings: spanWarnings(setup, sweep),
  };
}
