import { assessSpanWire, createEndResponseCache, spanWireSeries, type SpanWireCase } from '#shared/engine/index.ts';
import { caseSetup, windSweep } from '../../shared/engine/assessment/wind-sweep.ts';
import { stressEnvelope, stressPlaces } from '../../shared/engine/assessment/stress-places.ts';
import { respondEnds, sweepSpan } from '../../shared/engine/span/sweep-span.ts';
import { aBasis, aSpanWire, endWith } from '../reference/engine-cases.ts';
import { plainSweep } from './plain-sweep.ts';

/** Aim for one sweep of 150 frequencies with two dampers per end on one core; the bench fails at twice that. */
const aimMs = 0.35;
const agreementRatio = 1e-6;

const basis = aBasis();
const input = aSpanWire({ ends: [endWith(1, 2.2), endWith(1.1, 2.35)] });

/** Best of many short bursts: another program's turn on the core lengthens some, not all. */
function bestMs(run: () => void, { callCount, burstCount }: { callCount: number; burstCount: number }): number {
  let best = Infinity;
  for (let burst = 0; burst < burstCount; burst += 1) {
    const start = performance.now();
    for (let call = 0; call < callCount; call += 1) run();
    best = Math.min(best, (performance.now() - start) / callCount);
  }
  return best;
}

const bursts = { callCount: 10, burstCount: 200 };
const setup = caseSetup(input, basis);
const sweepOnce = (given: SpanWireCase) => {
  const checked = caseSetup(given, basis);
  const sweep = windSweep(checked, basis);
  return stressEnvelope(checked, stressPlaces(checked, basis, sweep), sweep);
};
const sweep = windSweep(setup, basis);
const { frequenciesHz } = sweep;
const responded = respondEnds(setup, frequenciesHz);

const plainRows = plainSweep(input, Array.from(frequenciesHz));
const worstDifference = plainRows.reduce((worst, row, index) => {
  const differences = ([0, 1] as const).map((end) => {
    const engine = sweep.endAmplitudesM[end][index] ?? NaN;
    const curvature = sweep.responses[end].clampCurvaturePerM2[index] ?? NaN;
    const strain = (input.wire.outerStrandDiameterM / 2) * curvature * engine;
    return Math.max(Math.abs(row.endAmplitudeM[end] / engine - 1), Math.abs(row.clampStrainRatio[end] / strain - 1));
  });
  return Math.max(worst, ...differences);
}, 0);

const lengths = Array.from({ length: 20 }, (_, index) => 250 + 10 * index);
const cache = createEndResponseCache();
const section = () =>
  lengths.forEach((lengthM) => assessSpanWire({ ...input, span: { ...input.span, lengthM } }, basis, cache));

const figures = {
  'sweep of 150 frequencies, two dampers per end, nothing kept': bestMs(() => sweepOnce(input), bursts),
  '  of it: both ends': bestMs(() => respondEnds(setup, frequenciesHz), bursts),
  '  of it: balance along the span': bestMs(() => sweepSpan(setup, responded), bursts),
  'assessment (sweep, search, energies, methods), nothing kept': bestMs(() => assessSpanWire(input, basis), bursts),
  'assessment, end responses kept within a section':
    bestMs(section, { callCount: 1, burstCount: 100 }) / lengths.length,
  'series for charts (rows with energies)': bestMs(() => spanWireSeries(input, basis), bursts),
  'plain path': bestMs(() => plainSweep(input, Array.from(frequenciesHz)), { callCount: 1, burstCount: 2 }),
};
for (const [name, ms] of Object.entries(figures)) process.stdout.write(`${name.padEnd(62)} ${ms.toFixed(3)} ms\n`);
const sweepMs = figures['sweep of 150 frequencies, two dampers per end, nothing kept'];
process.stdout.write(`plain path / engine ${(figures['plain path'] / sweepMs).toFixed(0)}\n`);
process.stdout.write(`largest difference from the plain path ${worstDifference.toExponential(1)}\n`);
if (!(worstDifference <= agreementRatio)) {
  process.stderr.write(`the plain path differs by more than ${agreementRatio}\n`);
  process.exitCode = 1;
}
if (!(sweepMs <= 2 * aimMs)) {
  process.stderr.write(`the sweep takes more than twice the aim of ${aimMs} ms\n`);
  process.exitCode = 1;
}
