import {
  catenary,
  catenaryMeanTension,
  catenarySlack,
  lineLoad,
  parabolaLength,
  parabolaSag,
  rulingSpan,
  stateChange,
  stateChangeCatenary,
  tensionParameter,
  terrainFactor,
  terrainRoughness,
  terrainWind,
  weibullMean,
  weibullShare,
  windPressure,
} from '#shared/engine/index.ts';

type Input = (name: string) => number;
type Answer = (input: Input) => number | readonly number[];

const gravityMPerS2 = 9.80665;
const poundKg = 0.45359237;
const footM = 0.3048;
const inchM = 0.0254;
const poundForceN = poundKg * gravityMPerS2;
const poundPerFootN = poundForceN / footM;
const poundPerSquareFootPa = poundForceN / footM ** 2;
const iceDensityKgPerM3 = (57 * poundKg) / footM ** 3;
const zeroCelsiusK = 273.15;

const level = (input: Input) => ({ lengthM: input('S_m'), tensionN: input('H_N'), weightNPerM: input('w_N_per_m') });
const rising = (input: Input) => ({ ...level(input), riseM: input('h_m') });

/** US customary: a uniform factor of force cancels out of every ratio, so newtons per metre are right throughout. */
const american = (input: Input) => ({
  lengthM: input('S_ft') * footM,
  tensionN: input('H_lbf') * poundForceN,
  weightNPerM: input('w_lb_per_ft') * poundPerFootN,
});

function printedSag(input: Input): number {
  const tensionN = input('T_lbf') * poundForceN;
  const span = { lengthM: input('S_ft') * footM, weightNPerM: input('w_lb_per_ft') * poundPerFootN };
  let low = tensionN / 2;
  let high = tensionN;
  for (let index = 0; index < 60; index += 1) {
    const middle = (low + high) / 2;
    if (catenaryMeanTension({ ...span, tensionN: middle }) < tensionN) low = middle;
    else high = middle;
  }
  return catenary({ ...span, tensionN: low }).sagM / footM;
}

const americanLoad = (input: Input, ice: number, pressure: number) =>
  lineLoad({
    diameterM: input('d_in') * inchM,
    massKgPerM: (input('w_lb_per_ft') * poundKg) / footM,
    iceThicknessM: ice * inchM,
    iceDensityKgPerM3,
    windPressurePa: pressure * poundPerSquareFootPa,
  });
const iced: Answer = (input) => americanLoad(input, input('t_in'), 0).verticalNPerM / poundPerFootN;
const resultant: Answer = (input) =>
  americanLoad(input, input('t_in'), input('p_psf')).resultantNPerM / poundPerFootN + input('K_lb_per_ft');
const blowOut: Answer = (input) => (americanLoad(input, input('t_in'), input('p_psf')).swingRad * 180) / Math.PI;
const orderLoads: Answer = (input) => {
  const bare = americanLoad(input, 0, input('p_light_psf'));
  const heavy = americanLoad(input, input('t_in'), input('p_heavy_psf'));
  return [bare.windNPerM, bare.resultantNPerM, heavy.verticalNPerM, heavy.windNPerM, heavy.resultantNPerM].map(
    (loadNPerM) => loadNPerM / poundPerFootN,
  );
};

const change = (input: Input) => ({
  rulingSpanM: input('S_m'),
  axialStiffnessN: input('E_GPa') * 1e3 * input('A_mm2'),
  expansionPerK: input('alpha_per_C'),
  from: {
    tensionN: input('H1_N'),
    weightNPerM: input('w1_N_per_m'),
    temperatureK: input('t1_C') + zeroCelsiusK,
  },
  to: { weightNPerM: input('w2_N_per_m'), temperatureK: input('t2_C') + zeroCelsiusK },
});
const steadyOf = (result: ReturnType<typeof stateChange>) => (result.outcome === 'steady' ? result.tensionN : NaN);
const parabolic: Answer = (input) => steadyOf(stateChange(change(input)));
const exact: Answer = (input) => steadyOf(stateChangeCatenary(change(input)));
const sheet: Answer = (input) => {
  const weightNPerM = input('w_kg_per_m') * gravityMPerS2;
  const result = stateChange({
    rulingSpanM: input('S_m'),
    axialStiffnessN: input('E_kgf_per_mm2') * input('A_mm2') * gravityMPerS2,
    expansionPerK: input('alpha_per_C'),
    from: { tensionN: input('H1_kgf') * gravityMPerS2, weightNPerM, temperatureK: input('t1_C') + zeroCelsiusK },
    to: { weightNPerM, temperatureK: input('t2_C') + zeroCelsiusK },
  });
  return steadyOf(result) / gravityMPerS2;
};

const spans = (count: number): Answer => {
  return (input) => rulingSpan(Array.from({ length: count }, (_, index) => input(`S${index + 1}_m`)));
};

const terrain = (category: '0' | 'I' | 'III' | 'IV'): Answer => {
  return () => [terrainRoughness(category).roughnessM, terrainRoughness(category).leastHeightM];
};
const stillAir = { windSpeedMPerS: 0, densityKgPerM3: 1.25 };
const ground = (input: Input) => ({ roughnessM: input('z0_m'), leastHeightM: input('zmin_m') });
const turbulence: Answer = (input) => terrainWind(ground(input), input('z_m'), stillAir).turbulenceIntensityRatio;
const roughness: Answer = (input) => terrainWind(ground(input), input('z_m'), stillAir).roughnessCoef;
const gust: Answer = (input) =>
  terrainWind(ground(input), input('z_m'), {
    windSpeedMPerS: input('vb_m_per_s'),
    densityKgPerM3: input('rho_kg_per_m3'),
  }).gustPressurePa;
const weibull = (input: Input) => ({ scaleMPerS: input('c_m_per_s'), shapeNumber: input('k_none') });

/** Answers to the statics checks by pattern of their id; the first that fits is taken. */
export const staticsAnswers: readonly (readonly [RegExp, Answer])[] = [
  [/^sta-cat-sag-/, (input) => catenary(level(input)).sagM],
  [/^sta-par-sag-/, (input) => parabolaSag(level(input))],
  [/^sta-cat-len-1$/, (input) => catenary(level(input)).wireLengthM],
  [/^sta-cat-slack-1$/, (input) => catenarySlack(level(input))],
  [/^sta-par-len-1$/, (input) => parabolaLength(input('S_m'), input('D_m'))],
  [/^sta-cat-tens-1$/, (input) => catenary(level(input)).endTensionsN[1]],
  [
    /^sta-cat-const-1$/,
    (input) => tensionParameter({ tensionN: input('H_N'), massKgPerM: input('w_N_per_m') / gravityMPerS2 }),
  ],
  [/^sta-incl-low-/, (input) => catenary(rising(input)).lowPointM],
  [/^sta-incl-len-1$/, (input) => catenary(rising(input)).wireLengthM],
  [/^sta-mem-600-sag$/, (input) => parabolaSag(american(input)) / footM],
  [/^sta-mem-600-len$/, (input) => parabolaLength(input('S_ft'), input('D_ft'))],
  [/^sta-600-cat$/, (input) => catenary(american(input)).sagM / footM],
  [/^sta-1000-cat-len$/, (input) => catenary(american(input)).wireLengthM / footM],
  [/^sta-drake700-/, printedSag],
  [/^sta-ice-drake/, iced],
  [/^sta-res-drake-/, resultant],
  [/^sta-blow-(heavy|medium|light|6psf)$/, blowOut],
  [/^sta-wind-q-1$/, (input) => windPressure(input('rho_kg_per_m3'), input('V_m_per_s'))],
  [/^sta-go95-/, orderLoads],
  [/^sta-rs-(print|equal)$/, spans(3)],
  [/^sta-rs-1$/, spans(5)],
  [/^sta-cos-(id|\d)$/, parabolic],
  [/^sta-cos-print-/, sheet],
  [/^sta-cos-cat-/, exact],
  [/^sta-en-t41-0$/, terrain('0')],
  [/^sta-en-t41-I$/, terrain('I')],
  [/^sta-en-t41-III$/, terrain('III')],
  [/^sta-en-t41-IV$/, terrain('IV')],
  [/^sta-en-kr-/, (input) => terrainFactor(input('z0_m'))],
  [/^sta-en-iv-/, turbulence],
  [/^sta-en-cr-/, roughness],
  [/^sta-en-qp-/, gust],
  [/^sta-wei-gamma-2$/, (input) => weibullMean({ scaleMPerS: 1, shapeNumber: input('k_none') })],
  [/^sta-wei-exceed$/, (input) => weibullShare(weibull(input), input('v_m_per_s'), Number.POSITIVE_INFINITY)],
  [/^sta-wei-band$/, (input) => weibullShare(weibull(input), input('v1_m_per_s'), input('v2_m_per_s'))],
];

/** Checks the engine does not answer, by pattern of their id, with the reason. */
export const unansweredStatics: readonly (readonly [RegExp, string])[] = [
  [/^sta-cat-tens-2$/, 'end tension comes from the catenary, not from a given sag'],
  [/^sta-blow-disp$/, 'no displacement of a swung span yet'],
  [/^sta-(ice|wind)-si$/, 'gravity and drag are not inputs of the load functions'],
  [/^sta-wind-q-(40|60|rho)$/, 'pressures in pounds and miles are for the edges'],
  [/^sta-wind-yaw$/, 'no oblique wind yet'],
  [/^sta-rs-sag$/, 'sag of a span comes from its tension, not from the ruling span sag'],
  [/^sta-therm-1$/, 'expansion is part of the state change'],
  [/^sta-unit-/, 'conversions are for the edges'],
  [/^sta-(geo|mix)-/, 'wire properties are inputs'],
  [/^sta-en-L-/, 'no length scale of turbulence yet'],
  [/^sta-wei-tab-/, 'no mode of the wind distribution; its mean is checked by sta-wei-gamma-2'],
  [/^sta-wei-(m3|median)$/, 'no cubic mean or median of the wind distribution'],
];
