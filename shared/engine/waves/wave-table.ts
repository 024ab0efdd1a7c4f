/** Wave numbers and impedances of a tensioned beam at a list of frequencies, as plain arrays for the inner loops. */
export interface WaveTable {
  readonly frequenciesHz: Float64Array;
  readonly angularFrequenciesRadPerS: Float64Array;
  /** k of the travelling wave. */
  readonly waveNumbersRadPerM: Float64Array;
  /** κ of the part that dies away from clamps and dampers; infinite for a string. */
  readonly decayNumbersPerM: Float64Array;
  /** Z = m·c_g: the mean flux of a wave of amplitude a is ½Zω²a². */
  readonly impedancesNsPerM: Float64Array;
  /** √(T² + 4EI·mω²) = EI(k² + κ²). */
  readonly stiffTensionsN: Float64Array;
}

/** Wire as the wave table needs it. */
export interface WaveWire {
  readonly massKgPerM: number;
  readonly tensionN: number;
  readonly bendingStiffnessNm2: number;
}

/**
 * Travelling and decaying wave numbers and the wave impedance of a tensioned beam, EI·y⁗ − T·y″ + m·ÿ = 0.
 *
 * k² = 2mω²/(T + R), κ² = (T + R)/2EI, c_g = (Tk + 2EI·k³)/(mω), Z = m·c_g, R = √(T² + 4EI·mω²).
 *
 * @param wire.massKgPerM          m, scalar [kg/m], > 0
 * @param wire.tensionN            T, scalar [N], > 0
 * @param wire.bendingStiffnessNm2 EI, scalar [N·m²], ≥ 0
 * @param frequenciesHz            f, [n] [Hz], each > 0
 * @returns arrays [n]
 * @source closed form: the two roots of EI·λ⁴ − T·λ² = mω² and the slope dω/dk
 * @validity small slopes, constant tension
 * @accuracy exact for the stated equation; this form of k² loses no digits as EI → 0
 */
export function waveTable(wire: WaveWire, frequenciesHz: Float64Array): WaveTable {
  const { massKgPerM: m, tensionN: T, bendingStiffnessNm2: EI } = wire;
  const count = frequenciesHz.length;
  const table: WaveTable = {
    frequenciesHz,
    angularFrequenciesRadPerS: new Float64Array(count),
    waveNumbersRadPerM: new Float64Array(count),
    decayNumbersPerM: new Float64Array(count),
    impedancesNsPerM: new Float64Array(count),
    stiffTensionsN: new Float64Array(count),
  };
  for (let index = 0; index < count; index += 1) {
    const w = 2 * Math.PI * (frequenciesHz[index] ?? 0);
    const R = Math.sqrt(T * T + 4 * EI * m * w * w);
    const k = w * Math.sqrt((2 * m) / (T + R));
    table.angularFrequenciesRadPerS[index] = w;
    table.stiffTensionsN[index] = R;
    table.waveNumbersRadPerM[index] = k;
    table.decayNumbersPerM[index] = Math.sqrt((T + R) / (2 * EI));
    table.impedancesNsPerM[index] = (k * (T + 2 * EI * k * k)) / w;
  }
  return table;
}
