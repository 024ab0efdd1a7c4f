export type * from './assessment/span-wire-assessment.ts';
export { assessSpanWire } from './assessment/assess-span-wire.ts';
export { createEndResponseCache } from './assessment/end-response-cache.ts';
export type { EndResponseCache } from './assessment/end-response-cache.ts';
export { spanWireProfile } from './assessment/span-wire-profile.ts';
export type { ProfileRequest } from './assessment/span-wire-profile.ts';
export { spanWireSeries } from './assessment/span-wire-series.ts';
export { hoursPerYearCount, normalWindHours } from './climate/normal-wind-hours.ts';
export { weibullMean, weibullShare } from './climate/weibull-share.ts';
export type { WeibullWind } from './climate/weibull-share.ts';
export type { ClimateSector, WindClimate } from './climate/wind-climate.ts';
export { yearlyCycles } from './climate/yearly-cycles.ts';
export { damperCommand } from './commands/damper-command.ts';
export { endCommand } from './commands/end-command.ts';
export { lifeCommand } from './commands/life-command.ts';
export type { LifeInput, LifeOutput } from './commands/life-command.ts';
export { placeCommand } from './commands/place-command.ts';
export type { PlaceInput } from './commands/place-command.ts';
export { spanCommand } from './commands/span-command.ts';
export { wavesCommand } from './commands/waves-command.ts';
export type { DamperHalf, DamperModel, ImpedanceRow } from './dampers/damper-model.ts';
export { damperNaturalFrequencies } from './dampers/damper-natural-frequencies.ts';
export type { ArmourRods, ClampSupport, PlacedDamper, SpanEnd } from './ends/span-end.ts';
export { absorbedShare, inverseStandingWaveRatio, nodePower, standingWaveRatio } from './ends/standing-wave-ratio.ts';
export { stringEndReflection } from './ends/string-end-reflection.ts';
export { fatigueCrossing, fatigueCycles, fatigueStress, safeBorderLines } from './life/fatigue-curve.ts';
export type { FatigueCurve } from './life/fatigue-curve.ts';
export { recorderLife } from './life/recorder-life.ts';
export type { RecorderMatrix } from './life/recorder-life.ts';
export { minerDamage } from './life/miner-damage.ts';
export type { MethodChoice, PartialMethodChoice } from './methods/method-choice.ts';
export type { EngineWarning, MethodNote, MethodStanding } from './methods/method-note.ts';
export { methodRegistry } from './methods/method-registry.ts';
export type { MethodEntry } from './methods/method-registry.ts';
export type { UserCurves } from './methods/user-curves.ts';
export { EngineInputError } from './numerics/engine-input-error.ts';
export { damperMotionShare, damperTestBand, ruleDistance } from './placement/rule-distance.ts';
export type {
  CatalogueDamper,
  PlacementChoice,
  PlacementProgress,
  PlacementResult,
  PlacementTask,
  PlannedDamper,
} from './placement/placement-types.ts';
export { searchPlacements } from './placement/search-placements.ts';
export { safeTension, tensionAtParameter, tensionParameter } from './screening/tension-parameter.ts';
export {
  attenuationLength,
  dampingPower,
  decayDampingRatio,
  nodePairSelfDamping,
} from './self-damping/laboratory-damping.ts';
export { powerLawSelfDamping, selfDampingCoefficient } from './self-damping/power-law-self-damping.ts';
export { selfDampingPower, selfDampingRatio } from './self-damping/self-damping-law.ts';
export { similaritySelfDamping } from './self-damping/similarity-self-damping.ts';
export { classicalBalance } from './span/classical-balance.ts';
export type { EndPair, SpanOutcome, SpanRow } from './span/span-row.ts';
export type { WireProperties } from './span/wire-properties.ts';
export { antinodeSpeedLimit, antinodeStrain, vibrationAngle } from './strain/antinode-strain.ts';
export {
  bendingAmplitudeOfAntinode,
  bendingAmplitudeOfStrain,
  strainOfBendingAmplitude,
} from './strain/poffenberger-swart.ts';
export { ENGINE_VERSION } from './version.ts';
export { bendingStiffnessMax, bendingStiffnessMin } from './waves/bending-stiffness.ts';
export type { StrandRing } from './waves/bending-stiffness.ts';
export { impedanceStep, lumpedMassReflection } from './waves/impedance-step.ts';
export { loopLength } from './waves/loop-length.ts';
export { spanNaturalFrequency, stringImpedance, stringWaveSpeed } from './waves/string-wave.ts';
export { waveDispersion, waveFrequency } from './waves/wave-dispersion.ts';
export {
  instantaneousWavePower,
  standingWaveEnergy,
  travellingWaveEnergy,
  travellingWavePower,
} from './waves/wave-energy.ts';
export { dianaFalcoCubic, dianaFalcoCurve } from './wind/diana-falco-curve.ts';
export { strouhalFrequency, strouhalWindSpeed, tradeStrouhalNumber } from './wind/strouhal-frequency.ts';
export { lockInTimeShare, turbulenceFactor } from './wind/turbulence-factor.ts';
export { turbulenceIntensity } from './wind/turbulence-intensity.ts';
export { cubicPeakRatio, windPower } from './wind/wind-power.ts';
export { catenary, catenaryMeanTension, catenarySlack } from './statics/catenary.ts';
export type { HangingShape, HangingSpan } from './statics/catenary.ts';
export { iceSleeveMass, lineLoad, windPressure } from './statics/line-load.ts';
export type { LineLoad, WireLoading } from './statics/line-load.ts';
export { parabolaLength, parabolaSag } from './statics/parabola.ts';
export { rulingSpan } from './statics/ruling-span.ts';
export { stateChange, stateChangeCatenary } from './statics/state-change.ts';
export type { ChangedTension, StateChange } from './statics/state-change.ts';
export { terrainFactor, terrainRoughness, terrainWind } from './statics/terrain-wind.ts';
export { oneLoopEllipse, twoLoopEllipse } from './galloping/galloping-ellipse.ts';
export type { GallopingEllipse } from './galloping/galloping-ellipse.ts';
export { denHartogSum, gallopingOnset } from './galloping/galloping-onset.ts';
export type { GallopingOnset, IcedWire } from './galloping/galloping-onset.ts';
export { effectiveAxialStiffness, irvineParameter, symmetricModeRatio } from './galloping/span-frequencies.ts';
export type { ElasticSpan } from './galloping/span-frequencies.ts';
