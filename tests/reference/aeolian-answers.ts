import {
  absorbedShare,
  antinodeSpeedLimit,
  antinodeStrain,
  attenuationLength,
  bendingAmplitudeOfAntinode,
  bendingAmplitudeOfStrain,
  bendingStiffnessMax,
  bendingStiffnessMin,
  classicalBalance,
  cubicPeakRatio,
  damperCommand,
  damperMotionShare,
  damperTestBand,
  dampingPower,
  decayDampingRatio,
  dianaFalcoCubic,
  fatigueCrossing,
  fatigueCycles,
  fatigueStress,
  impedanceStep,
  instantaneousWavePower,
  inverseStandingWaveRatio,
  loopLength,
  lumpedMassReflection,
  minerDamage,
  nodePairSelfDamping,
  nodePower,
  powerLawSelfDamping,
  ruleDistance,
  safeTension,
  selfDampingCoefficient,
  selfDampingPower,
  selfDampingRatio,
  spanNaturalFrequency,
  standingWaveEnergy,
  standingWaveRatio,
  strainOfBendingAmplitude,
  stringEndReflection,
  stringImpedance,
  stringWaveSpeed,
  strouhalFrequency,
  strouhalWindSpeed,
  tensionAtParameter,
  tensionParameter,
  tradeStrouhalNumber,
  travellingWaveEnergy,
  travellingWavePower,
  turbulenceFactor,
  turbulenceIntensity,
  vibrationAngle,
  waveDispersion,
  waveFrequency,
  weibullMean,
  weibullShare,
  windPower,
  yearlyCycles,
  type FatigueCurve,
  type StrandRing,
} from '#shared/engine/index.ts';
import { rootOf } from './root-of.ts';

/** Inputs of a check by name; asking for one that the check does not have fails the test. */
export type CheckInput = (name: string) => number;

/** The engine's answer to a check, in the check's unit. */
export type Answer = (input: CheckInput) => number;

const mPerMm = 1e-3;
const paPerMPa = 1e6;
const mwPerW = 1e3;
const nPerKn = 1e3;
const degPerRad = 180 / Math.PI;

const string = (v: CheckInput) => ({ tensionN: v('T_N'), massKgPerM: v('m_kg_per_m') });
const motion = (v: CheckInput) => ({ frequencyHz: v('f_Hz'), amplitudeM: v('A_m') });
const strouhalOf = (v: CheckInput) => ({ strouhalNumber: v('St_none'), diameterM: v('D_m') });
const step = (v: CheckInput, [first, second]: readonly [string, string]) =>
  impedanceStep(
    stringImpedance({ tensionN: v('T_N'), massKgPerM: v(first) }),
    stringImpedance({ tensionN: v('T_N'), massKgPerM: v(second) }),
  );
const masses = ['m1_kg_per_m', 'm2_kg_per_m'] as const;

const frequency: Answer = (v) => strouhalFrequency(strouhalOf(v), v('V_m_per_s'));

const absorbed: Answer = (v) => {
  const impedance = { re: v('ReZd_kg_per_s'), im: v('ImZd_kg_per_s') };
  const { re, im } = stringEndReflection(string(v), { frequencyHz: v('f_Hz'), distanceM: v('s_m'), impedance });
  return 1 - re * re - im * im;
};

const instantaneous = (v: CheckInput, isTowardsPlusX: boolean) =>
  instantaneousWavePower(string(v), motion(v), { phaseRad: v('phase_rad'), isTowardsPlusX });

function rings(v: CheckInput): StrandRing[] {
  const steel = { strandDiameterM: v('dSteel_m'), modulusPa: v('ESteel_Pa') };
  const outer = { strandDiameterM: v('dAl_m'), modulusPa: v('EAl_Pa') };
  const coreRadiusM = 1.5 * v('dSteel_m');
  return [
    { ...steel, strandCount: 1, ringRadiusM: 0 },
    { ...steel, strandCount: v('nSteel_none') - 1, ringRadiusM: v('dSteel_m') },
    { ...outer, strandCount: v('nAl1_none'), ringRadiusM: coreRadiusM + 0.5 * v('dAl_m') },
    { ...outer, strandCount: v('nAl2_none'), ringRadiusM: coreRadiusM + 1.5 * v('dAl_m') },
  ];
}

const clampWire = (v: CheckInput) => ({
  tensionN: v('T_N'),
  bendingStiffnessNm2: v('EI_N_m2'),
  outerStrandDiameterM: v('d_m'),
});
const fixedEnd = (v: CheckInput) => ({
  massKgPerM: v('m_kg_per_m'),
  bendingStiffnessNm2: v('EI_N_m2'),
  outerStrandDiameterM: v('d_m'),
});
const clampStress: Answer = (v) =>
  (v('E_Pa') * strainOfBendingAmplitude(clampWire(v), v('Yb_pp_m'), v('x_m'))) / paPerMPa;
const amplitudeOfStrain: Answer = (v) => bendingAmplitudeOfStrain(clampWire(v), v('eps_none'), v('x_m')) / mPerMm;

const branches = (v: CheckInput) => ({
  lowLevelPa: v('a1_MPa') * paPerMPa,
  lowExponentNumber: v('b1_none'),
  highLevelPa: v('a2_MPa') * paPerMPa,
  highExponentNumber: v('b2_none'),
});
const fatigueCurve = (v: CheckInput): FatigueCurve => ({ ...branches(v), breakCount: v('Nbreak_none') });
const borderStress: Answer = (v) => fatigueStress(fatigueCurve(v), v('N_none')) / paPerMPa;
const crossing: Answer = (v) => fatigueCrossing({ ...branches(v), breakCount: 1 });
const damage: Answer = (v) =>
  minerDamage(
    fatigueCurve(v),
    [1, 2, 3, 4].map((bin) => ({ stressPa: v(`s${bin}_MPa`) * paPerMPa, cyclesPerYearCount: v(`n${bin}_per_year`) })),
  );

const weibull = (v: CheckInput) => ({ scaleMPerS: v('A_m_per_s'), shapeNumber: v('k_none') });
const share: Answer = (v) => weibullShare(weibull(v), v('V1_m_per_s'), v('V2_m_per_s'));
const terrainLimit: Answer = (v) => {
  const terrain = v('terrain_none');
  if (terrain !== 1 && terrain !== 2 && terrain !== 3 && terrain !== 4) throw new Error(`terrain ${terrain}`);
  return safeTension(terrain).tensionParameterM;
};

const dampingWire = (v: CheckInput) => ({
  diameterM: v('D_mm') * mPerMm,
  massKgPerM: v('m_kg_per_m'),
  ratedStrengthN: v('RTS_kN') * nPerKn,
});
function powerLaw(wire: ReturnType<typeof dampingWire>, tensionN: number) {
  const law = powerLawSelfDamping({ ...wire, tensionN });
  if (law.outcome !== 'valid') throw new Error('the check lies outside the power law’s validity');
  return law.law;
}
const lawPower: Answer = (v) =>
  selfDampingPower(powerLaw(dampingWire(v), v('T_kN') * nPerKn), {
    frequencyHz: v('f_Hz'),
    xRatio: v('A_over_D_none'),
  });

const smoothAir = { densityKgPerM3: 1.225, turbulenceFactorRatio: 1 };
function balance(v: CheckInput, ends: { lengthM: number; endIswRatios: number[] }): number {
  const massKgPerM = v('m_kg_per_m');
  const tensionN = v('T_kN') * nPerKn;
  const wire = { diameterM: v('D_m'), massKgPerM, ratedStrengthN: v('RTS_kN') * nPerKn };
  const found = classicalBalance({
    wind: { frequencyHz: v('f_Hz'), diameterM: wire.diameterM, ...smoothAir },
    curve: dianaFalcoCubic(),
    selfDamping: powerLaw(wire, tensionN),
    impedanceNsPerM: stringImpedance({ tensionN, massKgPerM }),
    ...ends,
  });
  if (found.outcome !== 'steady') throw new Error(`the balance is ${found.outcome}`);
  return found.amplitudeRatio;
}

const half = (v: CheckInput, lossRatio: number) => ({
  massKg: v('M_kg'),
  inertiaKgM2: v('J_kg_m2'),
  armLengthM: v('L_m'),
  armStiffnessNm2: v('EI_N_m2'),
  offsetM: v('h_m'),
  lossRatio,
});
const naturalFrequency = (v: CheckInput, mode: 0 | 1) =>
  damperCommand({ model: { kind: 'halves', clampMassKg: 0, halves: [half(v, 0)] }, frequenciesHz: [1] })
    .naturalFrequenciesHz?.[0]?.[mode] ?? NaN;
function halfImpedance(v: CheckInput): { re: number; im: number } {
  const model = { kind: 'halves' as const, clampMassKg: 0, halves: [half(v, v('eta_none'))] };
  const impedance = damperCommand({ model, frequenciesHz: [v('f_Hz')] }).rows[0]?.impedance;
  if (impedance === null || impedance === undefined) throw new Error('no impedance');
  return impedance;
}

/** Mass of the first rope from the transmitted share, on the branch where the second rope is the heavier. */
const firstRopeMass: Answer = (v) => {
  const second = v('m2_kg_per_m');
  const shareOf = (first: number) => impedanceStep(Math.sqrt(first), Math.sqrt(second)).transmittedPowerRatio;
  return rootOf((first) => shareOf(first) - v('P_tr_W') / v('P_in_W'), { lower: 1e-6, upper: second });
};

/** How the engine answers each check, by the check's id. */
export const aeolianAnswers: Readonly<Record<string, Answer>> = {
  'aeo-strouhal-1': frequency,
  'aeo-strouhal-2': frequency,
  'aeo-strouhal-3': frequency,
  'aeo-strouhal-trade-const': () => tradeStrouhalNumber,
  'aeo-strouhal-trade-1': (v) =>
    strouhalFrequency({ strouhalNumber: tradeStrouhalNumber, diameterM: v('D_m') }, v('V_m_per_s')),
  'aeo-strouhal-jeans': (v) =>
    strouhalFrequency({ strouhalNumber: 1 / v('diameters_per_vortex_none'), diameterM: v('D_m') }, v('V_m_per_s')),
  'aeo-strouhal-inverse-1': (v) => strouhalWindSpeed(strouhalOf(v), v('f_Hz')),
  'aeo-wavespeed-1': (v) => stringWaveSpeed(string(v)),
  'aeo-impedance-1': (v) => stringImpedance(string(v)),
  'aeo-wavespeed-range': (v) => stringWaveSpeed(string(v)),
  'aeo-string-published-1': (v) => spanNaturalFrequency(string(v), { lengthM: v('L_m'), loopCount: 1 }),
  'aeo-loop-1': (v) => loopLength({ ...string(v), bendingStiffnessNm2: 0, frequencyHz: frequency(v) }),
  'aeo-harmonic-1': (v) => {
    const first = spanNaturalFrequency(string(v), { lengthM: v('L_m'), loopCount: 1 });
    return spanNaturalFrequency(string(v), { lengthM: v('L_m'), loopCount: Math.round(v('f_Hz') / first) });
  },
  'aeo-energy-ke-1': (v) => travellingWaveEnergy({ massKgPerM: v('m_kg_per_m'), tensionN: 1 }, motion(v)).kineticJPerM,
  'aeo-energy-pe-1': (v) => travellingWaveEnergy(string(v), motion(v)).potentialJPerM,
  'aeo-power-mean-1': (v) => travellingWavePower(string(v), motion(v)),
  'aeo-power-published-1': (v) => travellingWavePower(string(v), motion(v)),
  'aeo-power-inst-fwd': (v) => instantaneous(v, true),
  'aeo-power-inst-bwd': (v) => instantaneous(v, false),
  'aeo-energy-loop-1': (v) =>
    standingWaveEnergy(string(v), motion(v)) *
    loopLength({ ...string(v), bendingStiffnessNm2: 0, frequencyHz: v('f_Hz') }),
  'aeo-reflect-R-1': (v) => step(v, masses).reflectedRatio,
  'aeo-reflect-T-1': (v) => step(v, masses).transmittedRatio,
  'aeo-reflect-Pt-1': (v) => step(v, masses).transmittedPowerRatio,
  'aeo-reflect-published-R': (v) => step(v, masses).reflectedRatio,
  'aeo-reflect-published-T': (v) => step(v, masses).transmittedRatio,
  'aeo-reflect-problem-1': firstRopeMass,
  'aeo-lumped-mass-1': (v) =>
    lumpedMassReflection(v('M_kg'), { frequencyHz: v('f_Hz'), impedanceNsPerM: stringImpedance(string(v)) }),
  'aeo-damper-absorb-1': absorbed,
  'aeo-damper-absorb-2': absorbed,
  'aeo-damper-absorb-match': absorbed,
  'aeo-damper-absorb-node': absorbed,
  'aeo-swr-1': (v) => standingWaveRatio(v('R_none')),
  'aeo-iswr-1': (v) => inverseStandingWaveRatio(v('R_none')),
  'aeo-iswr-inverse-1': (v) => absorbedShare(v('S_none')),
  'aeo-iswr-power-1': (v) =>
    nodePower(stringImpedance(string(v)), {
      frequencyHz: v('f_Hz'),
      antinodeAmplitudeM: v('Aa_m'),
      nodeAmplitudeM: v('An_m'),
    }),
  'aeo-iswr-selfdamp-1': (v) =>
    nodePairSelfDamping(string(v), {
      frequencyHz: v('f_Hz'),
      antinodeAmplitudeM: v('Aa_m'),
      nearNodeAmplitudeM: v('a1_m'),
      farNodeAmplitudeM: v('a2_m'),
      loopCount: v('n_loops_none'),
    }),
  'aeo-zeta-power-1': (v) => dampingPower(v('zeta_none'), { massKgPerM: v('m_kg_per_m'), ...motion(v) }),
  'aeo-decay-1': (v) =>
    decayDampingRatio({ startAmplitudeM: v('A0_m'), endAmplitudeM: v('An_m'), cycleCount: v('n_cycles_none') }),
  'aeo-attenuation-1': (v) => attenuationLength(string(v), v('zeta_none'), v('f_Hz')),
  'aeo-dispersion-f-1': (v) => waveFrequency({ ...string(v), bendingStiffnessNm2: v('EI_N_m2') }, v('k_rad_per_m')),
  'aeo-dispersion-k-1': (v) =>
    waveDispersion({ ...string(v), bendingStiffnessNm2: v('EI_N_m2'), frequencyHz: v('f_Hz') }).waveNumberRadPerM,
  'aeo-dispersion-vg-1': (v) => {
    const wire = { ...string(v), bendingStiffnessNm2: v('EI_N_m2') };
    return waveDispersion({ ...wire, frequencyHz: waveFrequency(wire, v('k_rad_per_m')) }).groupSpeedMPerS;
  },
  'aeo-eimin-1': (v) => bendingStiffnessMin(rings(v)),
  'aeo-eimax-1': (v) => bendingStiffnessMax(rings(v)),
  'aeo-ps-stress-1': clampStress,
  'aeo-ps-stress-2': clampStress,
  'aeo-ps-stress-eimax': clampStress,
  'aeo-ps-inverse-1': amplitudeOfStrain,
  'aeo-ps-inverse-2': amplitudeOfStrain,
  'aeo-fymax-1': (v) => (v('E_Pa') * antinodeStrain(fixedEnd(v), v('f_Hz') * v('y_m'))) / paPerMPa,
  'aeo-fymax-limit-1': (v) => antinodeSpeedLimit(fixedEnd(v), v('sigma_Pa') / v('E_Pa')) / mPerMm,
  'aeo-bending-amp-1': (v) => {
    const wire = { tensionN: v('T_N'), bendingStiffnessNm2: v('EI_N_m2'), outerStrandDiameterM: 1 };
    const at = { massKgPerM: v('m_kg_per_m'), frequencyHz: v('f_Hz'), amplitudeM: v('y_m') };
    return bendingAmplitudeOfAntinode(wire, at, v('x_m')) / mPerMm;
  },
  'aeo-slope-1': (v) => vibrationAngle(string(v), v('f_Hz') * v('y_m')),
  'aeo-sbl-sigma-1': borderStress,
  'aeo-sbl-sigma-2': borderStress,
  'aeo-sbl-sigma-3': borderStress,
  'aeo-sbl-N-1': (v) => fatigueCycles(fatigueCurve(v), v('sigma_MPa') * paPerMPa),
  'aeo-sbl-cross-1': crossing,
  'aeo-sbl-cross-2': crossing,
  'aeo-miner-1': damage,
  'aeo-miner-life-1': (v) => 1 / damage(v),
  'aeo-weibull-bin-1': share,
  'aeo-weibull-sum-1': share,
  'aeo-weibull-mean-1': (v) => weibullMean(weibull(v)),
  'aeo-weibull-cycles-1': (v) =>
    yearlyCycles(weibull(v), {
      lowerMPerS: v('V1_m_per_s'),
      upperMPerS: v('V2_m_per_s'),
      frequencyHz: strouhalFrequency(strouhalOf(v), v('Vc_m_per_s')),
    }),
  'aeo-hw-1': (v) => tensionParameter(string(v)),
  'aeo-hw-limit-1': (v) => tensionAtParameter(v('Hw_m'), v('m_kg_per_m')) / v('RTS_N'),
  'aeo-tb273-1': terrainLimit,
  'aeo-tb273-2': terrainLimit,
  'aeo-tb273-3': terrainLimit,
  'aeo-tb273-4': terrainLimit,
  'aeo-placement-1': (v) =>
    ruleDistance({ ...string(v), ...strouhalOf(v) }, { loopShareRatio: v('q_none'), windSpeedMPerS: v('V_m_per_s') }),
  'aeo-placement-effect-1': (v) => damperMotionShare(v('q_none')),
  'aeo-damper-band': (v) => damperTestBand(v('D_m')).upperHz,
  'aeo-en-vcrit-1': (v) => strouhalWindSpeed({ strouhalNumber: v('St_none'), diameterM: v('b_m') }, v('f_Hz')),
  'aeo-en-iv-1': (v) => turbulenceIntensity({ heightM: v('z_m'), roughnessM: v('z0_m') }),
  'aeo-en-iv-2': (v) => turbulenceIntensity({ heightM: v('z_m'), roughnessM: v('z0_m') }),
  'aeo-turb-factor-1': (v) => turbulenceFactor(v('Iv_none')),
  'aeo-selfdamp-K-1': (v) => selfDampingCoefficient(dampingWire(v)),
  'aeo-selfdamp-1': (v) => lawPower(v) * mwPerW,
  'aeo-selfdamp-zeta-1': (v) =>
    selfDampingRatio(lawPower(v), {
      massKgPerM: v('m_kg_per_m'),
      frequencyHz: v('f_Hz'),
      amplitudeM: v('A_over_D_none') * v('D_mm') * mPerMm,
    }),
  'aeo-windpower-1': (v) =>
    windPower(dianaFalcoCubic(), {
      frequencyHz: v('f_Hz'),
      diameterM: v('D_m'),
      amplitudeRatio: v('x_none'),
      ...smoothAir,
    }) * mwPerW,
  'aeo-windpower-scale': (v) => {
    const at = { frequencyHz: 20, diameterM: 0.02, amplitudeRatio: 0.3, ...smoothAir };
    const scaled = { ...at, frequencyHz: 20 * v('rf_none'), diameterM: 0.02 * v('rD_none') };
    return windPower(dianaFalcoCubic(), scaled) / windPower(dianaFalcoCubic(), at);
  },
  'aeo-windpower-peak': (v) => cubicPeakRatio([0.2256, v('c1_none'), v('c2_none'), v('c3_none')]),
  'aeo-balance-1': (v) => balance(v, { lengthM: 1, endIswRatios: [] }),
  'aeo-balance-damped-1': (v) =>
    balance(v, { lengthM: v('L_m'), endIswRatios: Array.from({ length: v('n_ends_none') }, () => v('eta_none')) }),
  'aeo-stockbridge-f1': (v) => naturalFrequency(v, 0),
  'aeo-stockbridge-f2': (v) => naturalFrequency(v, 1),
  'aeo-stockbridge-z-1': (v) => Math.hypot(halfImpedance(v).re, halfImpedance(v).im),
  'aeo-stockbridge-phase-1': (v) => Math.atan2(halfImpedance(v).im, halfImpedance(v).re) * degPerRad,
  'aeo-test-days-1': (v) => v('N_none') / frequency(v) / 86_400,
  'aeo-test-830': (v) => {
    const diameterM = 0.02;
    const frequencyHz = (v('const_Hz_mm') * mPerMm) / diameterM;
    return rootOf((St) => strouhalFrequency({ strouhalNumber: St, diameterM }, v('V_m_per_s')) - frequencyHz, {
      lower: 0.01,
      upper: 1,
    });
  },
};

/** Checks that the engine does not answer, and why. */
export const unansweredAeolian: Readonly<Record<string, string>> = {
  'aeo-en-scruton-1': 'the Scruton number belongs to towers and masts; no method of the engine uses it',
  'aeo-en-amplitude-1': 'the Eurocode amplitude is for cantilevers such as towers; it is no conductor method',
  'aeo-en-clat-1': 'the lateral force coefficient of the Eurocode is for towers; no method of the engine uses it',
};
