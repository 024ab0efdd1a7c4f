import {
  denHartogSum,
  effectiveAxialStiffness,
  gallopingOnset,
  iceSleeveMass,
  irvineParameter,
  lineLoad,
  oneLoopEllipse,
  symmetricModeRatio,
  twoLoopEllipse,
} from '#shared/engine/index.ts';

type Input = (name: string) => number;
type Answer = (input: Input) => number;

const gravityMPerS2 = 9.80665;
const footM = 0.3048;
const inchM = 0.0254;
const poundKg = 0.45359237;

const span = (input: Input) => ({
  lengthM: input('L_m'),
  tensionN: input('H_N'),
  weightNPerM: input('m_kg_per_m') * gravityMPerS2,
  axialStiffnessN: input('EA_N'),
});
const stringFrequency = (input: Input) => Math.sqrt(input('H_N') / input('m_kg_per_m')) / (2 * input('L_m'));
const onset: Answer = (input) => {
  const found = gallopingOnset({
    massKgPerM: input('m_kg_per_m'),
    frequencyHz: input('f_Hz'),
    dampingRatio: input('zeta_none'),
    airDensityKgPerM3: input('rho_kg_per_m3'),
    referenceLengthM: input('d_m'),
    liftSlopeCoef: input('dCL_dalpha_perrad'),
    dragCoef: input('CD_none'),
  });
  return found.outcome === 'unstable' ? found.windSpeedMPerS : NaN;
};
const oneLoopFeet = (input: Input) => oneLoopEllipse(input('S_ft') * footM);
const twoLoopFeet = (input: Input) => twoLoopEllipse(input('L_ft') * footM, input('S_ft') * footM);
const swingFeet: Answer = (input) => {
  const { swingRad } = lineLoad({
    diameterM: input('d_in') * inchM,
    massKgPerM: (input('w_lb_per_ft') * poundKg) / footM,
    iceThicknessM: input('t_in') * inchM,
    iceDensityKgPerM3: (input('gamma_lb_per_ft3') * poundKg) / footM ** 3,
    windPressurePa: (input('p_psf') * poundKg * gravityMPerS2) / footM ** 2,
  });
  return (swingRad * 180) / Math.PI;
};
const swing: Answer = (input) => {
  const { swingRad } = lineLoad({
    diameterM: input('d_m'),
    massKgPerM: input('m_kg_per_m'),
    iceThicknessM: input('t_m'),
    iceDensityKgPerM3: input('rhoi_kg_per_m3'),
    windPressurePa: input('p_Pa'),
  });
  return (swingRad * 180) / Math.PI;
};

/** Answers to the galloping checks by pattern of their id. What no pattern fits, the engine does not compute. */
export const gallopingAnswers: readonly (readonly [RegExp, Answer])[] = [
  [/^gal-denhartog-/, (input) => denHartogSum((input('dCL_dalpha_perdeg') * 180) / Math.PI, input('CD_none'))],
  [/^gal-onset-/, onset],
  [/^gal-ellipse1-ft-1-M$/, (input) => oneLoopFeet(input).majorAxisM / footM],
  [/^gal-ellipse1-ft-1-B$/, (input) => oneLoopFeet(input).restPointM / footM],
  [/^gal-ellipse1-ft-1-D$/, (input) => oneLoopFeet(input).minorAxisM / footM],
  [/^gal-ellipse1-m-1-M$/, (input) => oneLoopEllipse(input('S_m')).majorAxisM],
  [/^gal-ellipse1-m-1-D$/, (input) => oneLoopEllipse(input('S_m')).minorAxisM],
  [/^gal-ellipse2-ft-\d-M$/, (input) => twoLoopFeet(input).majorAxisM / footM],
  [/^gal-ellipse2-ft-\d-B$/, (input) => twoLoopFeet(input).restPointM / footM],
  [/^gal-ellipse2-ft-\d-D$/, (input) => twoLoopFeet(input).minorAxisM / footM],
  [/^gal-ellipse2-m-1-M$/, (input) => twoLoopEllipse(input('L_m'), input('S_m')).majorAxisM],
  [/^gal-ellipse2-m-1-D$/, (input) => twoLoopEllipse(input('L_m'), input('S_m')).minorAxisM],
  [/^gal-swing-ft-/, swingFeet],
  [/^gal-swing-si-1$/, swing],
  [/^gal-irvine-sym1-/, (input) => symmetricModeRatio(input('lambda2_none'), 1)],
  [/^gal-irvine-sym2-/, (input) => symmetricModeRatio(input('lambda2_none'), 2)],
  [/^gal-irvine-lambda2-1$/, (input) => irvineParameter(span(input))],
  [/^gal-irvine-f1sym-1$/, (input) => symmetricModeRatio(irvineParameter(span(input)), 1) * stringFrequency(input)],
  [/^gal-strain-stiffness-1$/, (input) => effectiveAxialStiffness(input('EA_N'), input('K_N_per_m'), input('L_m'))],
  [
    /^gal-ice-mass-/,
    (input) =>
      iceSleeveMass({
        diameterM: input('d_m'),
        iceThicknessM: input('t_m'),
        iceDensityKgPerM3: input('rhoi_kg_per_m3'),
      }),
  ],
];
